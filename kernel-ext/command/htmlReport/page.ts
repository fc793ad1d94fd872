/**
 * The page around a report: policy, style sheet, landmarks.
 */
import { escapeHtml } from "../../display/escape";

/** Nothing is fetched and nothing runs: only the page's own style and pictures that are in it as data. */
const policy = "default-src 'none'; style-src 'unsafe-inline'; img-src data:; base-uri 'none'; form-action 'none'";

const style = `
:root{color-scheme:light dark;--paper:#fff;--text:#1d2733;--quiet:#566270;--line:#d5dbe2;--code:#f3f6f9;--link:#1f5f99;
--comment:#5d6b78;--string:#1c6b41;--number:#8a4510;--keyword:#6a3a94;--error:#a3262a;--error-paper:#fdf1f1}
@media (prefers-color-scheme:dark){:root{--paper:#14181d;--text:#dde3ea;--quiet:#9ba7b4;--line:#363f4a;--code:#1c2229;
--link:#86b9ea;--comment:#93a0ad;--string:#8ccba6;--number:#e0a878;--keyword:#c5a3e6;--error:#f19a9c;--error-paper:#2b1a1c}}
*{box-sizing:border-box}
body{margin:0;background:var(--paper);color:var(--text);font:16px/1.55 system-ui,"Segoe UI",Helvetica,Arial,sans-serif;overflow-wrap:break-word}
a{color:var(--link)}
:focus-visible{outline:2px solid var(--link);outline-offset:2px}
.skip{position:absolute;left:-100vw}
.skip:focus{left:1rem;top:.5rem;background:var(--paper);padding:.3rem .6rem;z-index:1}
header,main,nav,footer{max-width:58rem;margin:0 auto;padding:0 1.2rem}
header{padding-top:1.6rem}
h1,h2,h3,h4,h5,h6{line-height:1.25;margin:1.6em 0 .5em;text-wrap:balance}
h1{font-size:1.9rem;margin-top:.4em}h2{font-size:1.45rem}h3{font-size:1.2rem}h4,h5,h6{font-size:1.05rem}
nav{margin-top:.6rem}
nav ul{list-style:none;padding:0;margin:.3rem 0 0}
nav ul ul{padding-left:1.2rem;margin:0}
.nav-title{font-weight:600;margin:0;font-size:1rem}
article+article{margin-top:3rem;border-top:1px solid var(--line);padding-top:.5rem}
.cell{margin:1.1rem 0}
.count{color:var(--quiet);font-size:.82rem;font-variant-numeric:tabular-nums;margin:0 0 .15rem}
pre{margin:0;overflow-x:auto;font:.86rem/1.5 ui-monospace,SFMono-Regular,Menlo,Consolas,"DejaVu Sans Mono",monospace;tab-size:2}
pre.source{background:var(--code);border:1px solid var(--line);border-radius:4px;padding:.65rem .8rem}
:not(pre)>code{font:.9em ui-monospace,SFMono-Regular,Menlo,Consolas,"DejaVu Sans Mono",monospace;background:var(--code);padding:.05em .25em;border-radius:3px}
.code-comment{color:var(--comment);font-style:italic}.code-string{color:var(--string)}.code-number{color:var(--number)}.code-keyword{color:var(--keyword)}
.prose pre{background:var(--code);padding:.65rem .8rem;border-radius:4px}
.prose blockquote{margin:1em 0;padding-left:1em;border-left:3px solid var(--line);color:var(--quiet)}
.formula{overflow-x:auto;overflow-y:hidden}
.outputs{margin:.7rem 0 0}
.output{margin:0 0 .8rem;overflow-x:auto}
.stream-error{color:var(--error)}
.error{background:var(--error-paper);border:1px solid var(--error);border-radius:4px;padding:.6rem .8rem}
.error-head{color:var(--error);font-weight:600;margin:0 0 .3rem}
.left-out{color:var(--quiet);font-style:italic;margin:.3rem 0}
img{max-width:100%;height:auto}
img.cell-chart{max-width:max(100%,30rem)}
table{border-collapse:collapse;font-variant-numeric:tabular-nums lining-nums;font-size:.94rem}
.prose table{display:block;overflow-x:auto}
caption{caption-side:top;text-align:left;font-weight:600;padding:.2em 0 .4em;white-space:nowrap}
thead th{border-bottom:1.5px solid var(--text);vertical-align:bottom;text-align:left;padding:.2em .8em}
.cell-table thead th{min-width:4em;max-width:14em}
tbody th,tbody td{font-weight:400;padding:.2em .8em;text-align:left;vertical-align:baseline;border-bottom:1px solid var(--line)}
.cell-table tbody th,.cell-table tbody td{white-space:nowrap}
tr>:first-child{padding-left:.1em}
tr>.cell-right,tr>.cell-point{text-align:right}tr>.cell-center{text-align:center}tr>.cell-left{text-align:left}
.cell-scroll{overflow-x:auto;margin:0 0 .5em}
.cell-heading{font-weight:600;font-size:1.1rem;margin:.2em 0 .3em}
.cell-summary{margin:.2em 0 .7em;max-width:44em}
.cell-label{font-weight:600;font-size:.92rem;margin:.9em 0 .1em}
.cell-notes,.cell-sources{list-style:none;margin:0 0 .6em;padding:0;font-size:.92rem;color:var(--quiet)}
.cell-sources{columns:24em;column-gap:2em;font-size:.86rem}
.cell-notes li,.cell-sources li{margin:.15em 0;break-inside:avoid}
.cell-symbol{font-style:italic;font-weight:400;white-space:nowrap}
.cell-unit{font-weight:400;white-space:nowrap}
sub,sup{font-size:.75em;line-height:0}
footer{color:var(--quiet);font-size:.85rem;padding-top:2rem;padding-bottom:2rem}
@media (min-width:72rem){.cell-code{position:relative}.count{position:absolute;right:100%;margin:.7rem .7rem 0 0;white-space:nowrap}}
@media print{body{font-size:11pt}.skip,nav{display:none}.cell{break-inside:avoid-page}pre{white-space:pre-wrap}}
`;

/** A whole page; `heading` is HTML, empty when the content brings its own. */
export function page(parts: { title: string; heading: string; navigation: string; content: string }): string {
  const { title, heading, navigation, content } = parts;
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${policy}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="referrer" content="no-referrer">
<title>${escapeHtml(title)}</title>
<style>${style}</style>
</head>
<body>
<a class="skip" href="#content">Go to the content</a>
${heading === "" ? "" : `<header>${heading}</header>\n`}${navigation}<main id="content" tabindex="-1">
${content}
</main>
<footer><p>Made by cosmology-cells. This page is complete: it loads nothing from elsewhere.</p></footer>
</body>
</html>
`;
}
