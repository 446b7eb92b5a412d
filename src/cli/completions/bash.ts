// The completion script for bash. Words come from closed lists of ours, which hold no character that bash reads; files are left to bash.
import type { CompletedCommand, CompletedOption } from './model.js';

export const bashScript = (commands: readonly CompletedCommand[]): string =>
  `# Completions of keepsum for bash: . <(keepsum completions bash)
_keepsum() {
  local word="\${COMP_WORDS[COMP_CWORD]}" before="\${COMP_WORDS[COMP_CWORD-1]}" words=""
  # bash cuts --format=json at the equals sign.
  if [ "$word" = "=" ]; then word=""; before="\${COMP_WORDS[COMP_CWORD-1]}"
  elif [ "$before" = "=" ]; then before="\${COMP_WORDS[COMP_CWORD-2]}"; fi
  if [ "$COMP_CWORD" -eq 1 ]; then
    words="${[...commands.map(({ name }) => name), '--help', '--version'].join(' ')}"
  else
    case "\${COMP_WORDS[1]}" in
${commands.map(branch).join('\n')}
    esac
  fi
  COMPREPLY=($(compgen -W "$words" -- "$word"))
}
complete -o default -F _keepsum keepsum
`;

const branch = ({ name, options, operands }: CompletedCommand): string =>
  `      ${name})
        case "$before" in
${options
  .filter(({ placeholder }) => placeholder !== undefined)
  .map((option) => `          ${flags(option).join('|')}) words="${(option.names ?? []).join(' ')}" ;;`)
  .join('\n')}
          *) case "$word" in
            -*) words="${options.flatMap(flags).join(' ')}" ;;
            *) words="${(operands ?? []).join(' ')}" ;;
          esac ;;
        esac ;;`;

const flags = ({ flag, short }: CompletedOption): string[] => (short === undefined ? [flag] : [flag, short]);
