// How the report looks: on screens light and dark, on A4 and Letter. Contrast of words is at least 7 to 1 in both.

export const style = `
:root { color-scheme: light dark; --ink: #222; --paper: #fff; --rule: #767676; --soft: #f2f2f2; --note: #7a3d00; }
body { margin: 0; background: var(--paper); color: var(--ink); font: 1rem/1.55 system-ui, 'Segoe UI', Verdana, sans-serif; }
main { max-width: 46rem; margin: 0 auto; padding: 1.5rem 1.25rem 3rem; }
h1 { font-size: 1.6rem; line-height: 1.25; }
h2 { font-size: 1.2rem; margin: 2rem 0 .4rem; }
h3 { font-size: 1.05rem; margin: 1.5rem 0 .3rem; }
p { margin: .5rem 0; overflow-wrap: anywhere; }
a { color: inherit; }
.answer { font-weight: 600; }
.warning { border-left: .25rem solid var(--note); padding-left: .75rem; }
.warning::before { content: 'Take note: '; font-weight: 600; color: var(--note); }
.wide { overflow-x: auto; margin: .75rem 0; }
table { border-collapse: collapse; font-variant-numeric: tabular-nums; min-width: min(22rem, 100%); }
caption { text-align: left; padding-bottom: .3rem; }
th, td { padding: .25rem .8rem .25rem 0; text-align: left; vertical-align: top; font-weight: normal; }
tbody th, tfoot th { min-width: 5.5rem; max-width: 18rem; }
thead th { max-width: 11rem; vertical-align: bottom; }
th { overflow-wrap: break-word; }
td.number { white-space: nowrap; }
td.words { min-width: 7rem; max-width: 22rem; }
thead th, thead td { border-bottom: 1px solid var(--rule); }
tfoot th, tfoot td { border-top: 1px solid var(--rule); }
.number, thead th:not(:first-child, .words) { text-align: right; }
.more::after { content: ' +'; }
.fewer::after { content: ' \\2212'; }
.endings { padding-left: 1.25rem; }
pre { background: var(--soft); padding: .75rem; white-space: pre-wrap; overflow-wrap: anywhere; }
figure { margin: 1rem 0; }
.keepsum-picture { width: 26rem; max-width: 100%; height: auto; }
ul { padding-left: 1.2rem; }
.sources { font-size: .9rem; overflow-wrap: anywhere; }
article + article { border-top: 1px solid var(--rule); margin-top: 3rem; }
footer { margin-top: 2.5rem; border-top: 1px solid var(--rule); padding-top: .5rem; font-size: .9rem; }
@media screen and (prefers-color-scheme: dark) {
  :root { --ink: #eaeaea; --paper: #181818; --rule: #9a9a9a; --soft: #272727; --note: #ffb870; }
  .keepsum-paper { fill: #181818; }
  .keepsum-words, .keepsum-ink { fill: #eaeaea; }
  .keepsum-line, .keepsum-observed { stroke: #eaeaea; }
  .keepsum-casing { stroke: #181818; }
  .keepsum-none { fill: #181818; stroke: #eaeaea; }
  .keepsum-picture [stroke='#0072b2'] { stroke: #56b4e9; }
  .keepsum-picture [fill='#0072b2'] { fill: #56b4e9; }
  .keepsum-picture [stroke='#d55e00'] { stroke: #e69f00; }
}
@page { margin: 18mm; }
@media print {
  :root { color-scheme: light; font-size: 10pt; }
  body { line-height: 1.4; }
  main { max-width: none; padding: 0; }
  h1 { font-size: 15pt; margin: 0 0 .5rem; }
  h2 { font-size: 12pt; margin: 1.1rem 0 .3rem; }
  h3 { font-size: 10.5pt; margin: .9rem 0 .2rem; }
  p, .wide, figure { margin: .35rem 0; }
  p { orphans: 3; widows: 3; }
  h1, h2, h3 { break-after: avoid; }
  figure, pre, tr, .answer, .warning { break-inside: avoid; }
  .wide { overflow: visible; }
  /* As small as the number of columns asks for, as long as it can be read. */
  table { max-width: 100%; font-size: clamp(4.5pt, calc(140mm / var(--columns, 1) / 4), 9pt); }
  th, td { padding-right: .5em; }
  tbody th, tfoot th { min-width: 6em; }
  thead th { overflow-wrap: anywhere; min-width: 3.5em; }
  td.words { min-width: 6em; overflow-wrap: anywhere; }
  .keepsum-picture { width: 85mm; }
  footer { margin-top: 1rem; break-before: avoid; }
  article + article { break-before: page; border: 0; margin: 0; }
}
`;
