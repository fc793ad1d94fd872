/**
 * The style sheet that goes with each HTML output. It names no colour: lines and quiet text are the front end's own text
 * colour made fainter, so that light and dark themes both work. The selectors carry enough weight to stand against the
 * zebra stripes and right alignment that Jupyter's own style sheets give every table.
 */

const rules = [
  ".cell-output{font-variant-numeric:tabular-nums lining-nums;line-height:1.45;max-width:100%}",
  ".cell-output .cell-scroll{overflow-x:auto;max-width:100%;margin:0 0 .6em}",
  ".cell-output .cell-heading{font-weight:600;font-size:1.1em;margin:.2em 0 .4em}",
  ".cell-output p.cell-summary{margin:.2em 0 .6em}",
  "div.cell-output table.cell-table{border-collapse:collapse;border:0;margin:0;font-size:inherit;table-layout:auto}",
  "div.cell-output table.cell-table caption{caption-side:top;text-align:left;font-weight:600;color:inherit;padding:.2em 0 .4em;white-space:nowrap}",
  "div.cell-output table.cell-table thead tr,div.cell-output table.cell-table tbody tr,div.cell-output table.cell-table tbody tr:nth-child(odd),div.cell-output table.cell-table tbody tr:nth-child(even){background:none;border:0}",
  "div.cell-output table.cell-table thead th{border:0;border-bottom:1.5px solid;font-weight:600;vertical-align:bottom;padding:.2em .9em;white-space:normal;min-width:4em;max-width:14em}",
  "div.cell-output table.cell-table tbody th,div.cell-output table.cell-table tbody td{border:0;font-weight:400;padding:.16em .9em;white-space:nowrap;vertical-align:baseline;position:relative}",
  'div.cell-output table.cell-table tbody tr+tr th::before,div.cell-output table.cell-table tbody tr+tr td::before{content:"";position:absolute;left:0;right:0;top:0;border-top:1px solid;opacity:.16}',
  "div.cell-output table.cell-table tr .cell-left{text-align:left}",
  "div.cell-output table.cell-table tr .cell-center{text-align:center}",
  "div.cell-output table.cell-table tr .cell-right,div.cell-output table.cell-table tr .cell-point{text-align:right}",
  "div.cell-output table.cell-table tr>:first-child{padding-left:.1em}",
  ".cell-output .cell-unit{font-weight:400;white-space:nowrap}",
  ".cell-output .cell-symbol{font-style:italic;font-weight:400;white-space:nowrap}",
  ".cell-output sub,.cell-output sup{font-size:.75em;line-height:0}",
  ".cell-output p.cell-label{font-weight:600;font-size:.93em;margin:.8em 0 .1em}",
  ".cell-output ul.cell-notes,.cell-output ul.cell-sources{list-style:none;margin:0 0 .6em;padding:0;font-size:.93em;max-width:60em}",
  ".cell-output ul.cell-sources{columns:26em;column-gap:2em;font-size:.88em;max-width:none}",
  ".cell-output ul.cell-sources li{break-inside:avoid}",
  ".cell-output ul.cell-notes li,.cell-output ul.cell-sources li{margin:.15em 0;padding:0}",
  ".cell-output code{font-size:.95em;background:none;padding:0;color:inherit}",
  ".cell-output img.cell-chart{max-width:100%;height:auto;display:block;margin:.4em 0}",
];

/** The style element of an output. */
export const outputStyle = `<style>\n${rules.join("\n")}\n</style>`;
