import { INK_NAMES, LAMP, PAPER, PRINT, type Inks } from '#shared/drawing/inks.ts';

const inks = (values: Inks) => INK_NAMES.map((name) => `--${name}:${values[name]}`).join(';');

const SERIF = "'Newsreader Variable','Source Serif 4 Variable','Commit Mono',serif";
const SANS = `'Instrument Sans Variable',${SERIF.replace(',serif', ',sans-serif')}`;

/** The look of a page that is taken along: the product's inks in both themes, and on paper. */
export const TAKE_ALONG_STYLE = `
:root{color-scheme:light;${inks(PAPER)}}
@media (prefers-color-scheme:dark){:root{color-scheme:dark;${inks(LAMP)}}}
*{box-sizing:border-box}
html{font-family:${SANS};font-variant-numeric:tabular-nums lining-nums;background:var(--paper);color:var(--ink);-webkit-text-size-adjust:100%}
body{margin:0 auto;max-width:72rem;padding:1.5rem 1.25rem 3rem;font-size:.9375rem;line-height:1.45}
h1,h2,h3,.value,.serif{font-family:${SERIF};font-weight:400}
h1{font-size:1.9rem;line-height:1.15;margin:0 0 .4rem}
h2{font-size:1.25rem;margin:2rem 0 .4rem}
h3{font-size:1.05rem;margin:1.2rem 0 .3rem}
p{margin:.25rem 0;max-width:46rem}
.value{font-size:1.45rem;white-space:nowrap}
.quiet,small{color:var(--ink-2)}
.beyond{color:var(--ink-3)}
small{display:block;font-size:.8125rem;font-family:${SANS}}
header{border-bottom:1px solid var(--ink);padding-bottom:.9rem}
header .quiet:first-child{margin:0}
.drawing,.table{overflow-x:auto;border-top:1px solid var(--rule);border-bottom:1px solid var(--rule)}
.drawing{padding:.5rem 0;text-align:center}
.drawing svg{display:block;margin:0 auto}
:focus-visible{outline:2px solid var(--brass);outline-offset:2px}
table{border-collapse:collapse;width:100%;font-size:.875rem}
th,td{text-align:left;vertical-align:top;padding:.35rem .75rem .35rem 0;border-bottom:1px solid var(--rule);font-weight:400}
thead th{color:var(--ink-2);font-size:.8125rem;border-bottom:1px solid var(--ink);white-space:nowrap}
tbody tr:last-child>*{border-bottom:0}
td.serif,td.number{white-space:nowrap}
td.serif{font-size:1rem}
.number{text-align:right}
b,code,.mono{font-family:'Commit Mono',monospace;font-weight:400;font-size:.8125rem}
code{overflow-wrap:anywhere}
th b,.stands,tbody th.mono,td.mono .whole{white-space:nowrap}
.stands{display:block}
section>p:not(.quiet):not(#verdict){font-family:${SERIF};font-size:1.05rem}
.sound{color:var(--sound)}.caution{color:var(--caution)}.broken{color:var(--broken)}.unjudged{color:var(--unjudged)}.ink-3{color:var(--ink-3)}
footer{border-top:1px solid var(--ink);margin-top:2.5rem}
#verdict.holds{color:var(--sound)}
#verdict.broken{color:var(--broken);font-size:1.1rem}
@media (max-width:40rem){body{padding:1rem .9rem 2rem}.value{font-size:1.2rem;white-space:normal}table{min-width:40rem}}
@page{size:A4;margin:16mm 15mm}
@media print{:root{color-scheme:light;${inks(PRINT)}}body{max-width:none;padding:0;font-size:9.5pt}.drawing,.table{overflow:visible}.drawing svg{max-width:100%;height:auto;max-height:240mm}table{min-width:0;font-size:8.5pt}tr,h2,h3{break-inside:avoid}h2,h3{break-after:avoid}thead{display:table-header-group}}
`;
