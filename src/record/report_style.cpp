#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {

// A page of a laboratory notebook: paper, ink, one margin line, thin rules.
// Each state has a mark of its own shape besides its colour; a withheld cell is
// hatched. All texts reach a contrast of 4.5 against their ground.
const char* const kReportStyle = R"css(
:root{--paper:#fdfcf8;--ink:#1b2430;--soft:#53606d;--rule:#d5d9de;
--margin:#b9675c;--link:#1d4f80;--shade:#f3f1e9;
--reportable:#0b5a48;--reportable-bg:#e4f1ec;--estimated:#6f4700;
--estimated-bg:#fbefd6;--not-detected:#4b5764;--not-detected-bg:transparent;
--above-range:#5a2c84;--above-range-bg:#efe6f6;--withheld:#98202a;
--withheld-bg:#fbe7e5;--hatch:rgba(152,32,42,.13);--curve:#1d4f80;
--window:#e9eef3;--band:#f6ead0;--noise:#dfe3d2}
@media (prefers-color-scheme:dark){:root{--paper:#14181d;--ink:#e8e5dc;
--soft:#a6b0bb;--rule:#3a434d;--margin:#a8645c;--link:#8fbfec;--shade:#1c2229;
--reportable:#83d9bc;--reportable-bg:#12312a;--estimated:#f0c673;
--estimated-bg:#352a10;--not-detected:#b0bac4;--not-detected-bg:transparent;
--above-range:#cfaef3;--above-range-bg:#2c213c;--withheld:#ffa39c;
--withheld-bg:#3b1c1e;--hatch:rgba(255,163,156,.12);--curve:#8fbfec;
--window:#222b34;--band:#332b18;--noise:#333b2b}}
*{box-sizing:border-box}
html{color-scheme:light dark;-webkit-text-size-adjust:100%}
body{margin:0;background:var(--paper);color:var(--ink);
font:16px/1.5 "Noto Sans","Liberation Sans","Segoe UI",Helvetica,sans-serif}
main{max-width:1180px;margin:0 auto;padding:2rem 2rem 4rem 3.5rem;
border-left:2px solid var(--margin)}
h1,h2,h3,.lead{font-family:"Noto Serif","Liberation Serif",Georgia,serif;
line-height:1.25;font-weight:600;overflow-wrap:anywhere}
h1{font-size:2rem;margin:0}h1 small{font-weight:400;color:var(--soft);
font-size:1.3rem;white-space:nowrap}
h2{font-size:1.45rem;margin:0 0 .8rem}
h3{font-size:1.08rem;margin:1.8rem 0 .6rem}
.lead{font-size:1.15rem;font-weight:400;margin:.2rem 0 1.2rem}
.over{margin:0;color:var(--soft);font-size:.85rem;letter-spacing:.06em}
section{margin-top:2.4rem;padding-top:1.4rem;border-top:1px solid var(--rule)}
a{color:var(--link)}a:focus-visible,.wide:focus-visible,summary:focus-visible{
outline:3px solid var(--link);outline-offset:2px}
code{font-family:"Noto Sans Mono","Liberation Mono",monospace;font-size:.85em}
.hash{overflow-wrap:anywhere}time{white-space:nowrap}
.facts{display:grid;grid-template-columns:repeat(auto-fit,minmax(250px,1fr));
gap:.7rem 2rem;margin:0 0 1.2rem}
.facts dt{color:var(--soft);font-size:.82rem}.facts dd{margin:0;
overflow-wrap:anywhere}
nav{display:flex;flex-wrap:wrap;gap:.3rem 1.2rem}
.calm{color:var(--soft)}
.trouble{border-left:4px solid var(--withheld);padding-left:.8rem}
ul{padding-left:1.2rem}li{margin:.25rem 0;overflow-wrap:anywhere}
.attention{list-style:none;padding:0}
.attention li{border-left:4px solid var(--withheld);padding:.15rem 0 .15rem .8rem;
margin:.5rem 0}
.legend{list-style:none;display:flex;flex-wrap:wrap;gap:.5rem .8rem;padding:0}
.legend li{padding:.2rem .7rem .2rem .5rem;border:1px solid currentColor;
border-radius:3px;margin:0}
.mark{width:.8em;height:.8em;margin-right:.4em;vertical-align:-.04em;
fill:none;stroke:currentColor;stroke-width:1.6}
.wide{overflow-x:auto;margin:.6rem 0}
table{border-collapse:separate;border-spacing:0;width:100%;font-size:.92rem;
font-variant-numeric:tabular-nums}
th,td{text-align:left;vertical-align:top;padding:.4rem .7rem;
border-bottom:1px solid var(--rule);font-weight:400}
thead th{border-bottom:2px solid var(--ink);font-weight:600;
vertical-align:bottom}
.number{text-align:right;white-space:nowrap}
.under,.why,.bounds-text{display:block;font-size:.8rem;color:var(--soft);
font-weight:400;white-space:nowrap}
.grid td{white-space:nowrap}
.grid .sample{min-width:11rem;max-width:20rem;overflow-wrap:anywhere}
.grid .third{color:var(--soft)}
.grid td.none{color:var(--soft)}
.grid tbody tr:hover>*{box-shadow:inset 0 -1px 0 var(--ink)}
.grid td:target{outline:3px solid var(--link);outline-offset:-3px}
.value{font-weight:600}
.letter{margin-left:.45em;font-size:.8rem}
.reportable{color:var(--reportable);background:var(--reportable-bg)}
.estimated{color:var(--estimated);background:var(--estimated-bg)}
.not-detected{color:var(--not-detected);background:var(--not-detected-bg)}
.above-range{color:var(--above-range);background:var(--above-range-bg)}
.withheld{color:var(--withheld);background:repeating-linear-gradient(135deg,
var(--hatch) 0 2px,transparent 2px 8px),var(--withheld-bg)}
td.withheld .why,td.estimated .why,td.reportable .why,td.above-range .why{
color:inherit}
.unseen{position:absolute;width:1px;height:1px;overflow:hidden;
clip-path:inset(50%);white-space:nowrap}
.grid td{position:relative}
.terms{margin:0;padding:0;list-style:none;min-width:16rem}
.terms li{margin:0 0 .2rem}.finding{color:var(--estimated)}
.reason{color:var(--soft)}
.governs th{font-weight:600}
.passed{color:var(--reportable);white-space:nowrap}
.failed{color:var(--withheld);font-weight:600;white-space:nowrap}
.unchecked{color:var(--soft);white-space:nowrap}
.small{font-size:.82rem}
@media (max-width:640px){main{padding:1rem .8rem 3rem 1rem}
h1{font-size:1.5rem}h2{font-size:1.25rem}
.grid .sample{min-width:8rem;max-width:9.5rem;position:sticky;left:0;
z-index:1;background:var(--paper)}
th,td{padding:.35rem .5rem}}
@media print{@page{size:A4;margin:14mm 12mm}
:root{--paper:#fff;--ink:#000;--soft:#444;--rule:#bbb;--link:#000;
--reportable:#0b5a48;--reportable-bg:#e4f1ec;--estimated:#6f4700;
--estimated-bg:#fbefd6;--not-detected:#444;--above-range:#5a2c84;
--above-range-bg:#efe6f6;--withheld:#98202a;--withheld-bg:#fbe7e5;
--hatch:rgba(152,32,42,.13);--curve:#1d4f80;--window:#e9eef3;--band:#f6ead0;--noise:#dfe3d2}
*{-webkit-print-color-adjust:exact;print-color-adjust:exact}
html{font-size:9.5pt}body{font-size:1rem}main{max-width:none;padding:0;border:0}
nav,details:not(.panel){display:none}.wide{overflow:visible}table{font-size:.9rem}
th,td{padding:.2rem .35rem}.grid .sample{min-width:0;max-width:11rem}
.grid td,.under,.why,.bounds-text,.number{white-space:normal}
.terms{min-width:0}
figure,tr,.attention li{break-inside:avoid}h2,h3{break-after:avoid}
thead{display:table-header-group}a{text-decoration:none}}
)css";

const char* const kReportMarks = R"svg(
<svg width="0" height="0" aria-hidden="true" style="position:absolute">
<symbol id="mark-reportable" viewBox="0 0 12 12"><rect x="1.5" y="1.5" width="9" height="9" fill="currentColor"/></symbol>
<symbol id="mark-estimated" viewBox="0 0 12 12"><circle cx="6" cy="6" r="4.8"/><path d="M1.2 6a4.8 4.8 0 0 0 9.6 0z" fill="currentColor"/></symbol>
<symbol id="mark-not-detected" viewBox="0 0 12 12"><circle cx="6" cy="6" r="4.8"/></symbol>
<symbol id="mark-above-range" viewBox="0 0 12 12"><path d="M6 1l5 9.6H1z" fill="currentColor"/></symbol>
<symbol id="mark-withheld" viewBox="0 0 12 12"><path d="M1.8 1.8l8.4 8.4M10.2 1.8l-8.4 8.4" stroke-width="2.4"/></symbol>
<symbol id="grade-valid" viewBox="0 0 12 12"><path d="M1.5 6.5l3.2 3.4L10.5 2.4" stroke-width="2"/></symbol>
<symbol id="grade-note" viewBox="0 0 12 12"><path d="M1 6.5l2.6 3L8 3" stroke-width="2"/><circle cx="10.4" cy="9.6" r="1" fill="currentColor"/></symbol>
<symbol id="grade-caution" viewBox="0 0 12 12"><path d="M6 1.2l5 9.4H1z"/><path d="M6 4.6v2.8M6 8.6v.8" stroke-width="1.4"/></symbol>
<symbol id="grade-not-valid" viewBox="0 0 12 12"><circle cx="6" cy="6" r="5"/><path d="M2.6 9.4l6.8-6.8" stroke-width="1.8"/></symbol>
<symbol id="grade-not-applicable" viewBox="0 0 12 12"><path d="M2 6h8" stroke-width="2"/></symbol>
<symbol id="limit-critical" viewBox="0 0 14 14"><path d="M7 2.5l5 9H2z"/></symbol>
<symbol id="limit-detection" viewBox="0 0 14 14"><circle cx="7" cy="7" r="5"/></symbol>
<symbol id="limit-quantitation" viewBox="0 0 14 14"><path d="M7 .8L13.2 7 7 13.2.8 7z"/></symbol>
<symbol id="limit-struck" viewBox="0 0 14 14"><path d="M1 1l12 12M13 1L1 13"/></symbol>
</svg>
)svg";

}  // namespace loqsmith
