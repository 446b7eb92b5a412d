// The completion script for zsh, with the words of the help beside each name.
import type { CompletedCommand, CompletedOption } from './model.js';

export const zshScript = (commands: readonly CompletedCommand[]): string =>
  `#compdef keepsum
# Completions of keepsum for zsh: keepsum completions zsh > a folder of $fpath, as _keepsum
_keepsum() {
  if (( CURRENT == 2 )); then
    local -a commands
    commands=(
${commands.map(({ name, words }) => `      ${quotedWord(`${name}:${words}`)}`).join('\n')}
    )
    _describe 'command' commands
    return
  fi
  local command="$words[2]"
  shift words
  (( CURRENT-- ))
  case "$command" in
${commands.map(branch).join('\n')}
  esac
}
if [ "$funcstack[1]" = "_keepsum" ]; then _keepsum "$@"; else compdef _keepsum keepsum; fi
`;

const branch = ({ name, options, operands }: CompletedCommand): string =>
  `    ${name})
      _arguments \\
${options.map((option) => `        ${optionSpec(option)} \\`).join('\n')}
        ${operands === undefined ? "'*:file:_files'" : quotedWord(`*:name:(${operands.join(' ')})`)}
      ;;`;

/** A flag that takes a value takes it behind an equals sign as well; one that may be repeated is offered again. */
function optionSpec({ flag, short, words, placeholder, names, repeats }: CompletedOption): string {
  const said = `[${words.replace(/[[\]\\]/g, '\\$&')}]`;
  const value =
    placeholder === undefined ? '' : `:${placeholder}:${names === undefined ? '_files' : `(${names.join(' ')})`}`;
  const named = `${flag}${placeholder === undefined ? '' : '='}`;
  return short === undefined
    ? quotedWord(`${repeats ? '*' : ''}${named}${said}${value}`)
    : `'(${flag} ${short})'{${named},${short}}${quotedWord(`${said}${value}`)}`;
}

const quotedWord = (text: string): string => `'${text.replaceAll("'", "'\\''")}'`;
