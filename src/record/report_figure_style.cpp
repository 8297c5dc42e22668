#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {

// Strokes of the figures, and the scale of limits: names, strips and numbers in
// a grid that becomes one column where there is no room beside each other. The
// scale's strips are as wide as there is room; their texts keep their size.
const char* const kFigureStyle = R"css(
.figures{display:grid;gap:1.4rem 2rem;
grid-template-columns:repeat(auto-fit,minmax(min(100%,420px),1fr))}
figure{margin:0;max-width:560px}
figcaption,.reading{font-size:.87rem;color:var(--soft);margin-top:.2rem}
.key{color:var(--curve)}.key.bad{color:var(--withheld);font-weight:700}
.figure{display:block;width:100%;height:auto}
.figure text{fill:var(--ink);font-size:12.5px;font-family:inherit}
.figure text.tick,.figure text.title{fill:var(--soft)}
.figure text.governs{font-weight:700}
.figure text.label{paint-order:stroke;stroke:var(--paper);stroke-width:5px;
stroke-linejoin:round}
.figure line,.figure polyline,.figure path{fill:none;stroke:var(--ink);
stroke-width:1}
.figure .grid{stroke:var(--rule);stroke-width:.6}
.figure .axis{stroke:var(--soft)}
.figure .row{stroke:var(--rule)}
.figure .curve{stroke:var(--curve);stroke-width:1.8}
.figure .beyond{stroke-dasharray:4 4;stroke-width:1}
.figure .point{fill:var(--curve);stroke:var(--paper);
stroke-width:1}
.figure .left-out{stroke:var(--withheld);stroke-width:2.2}
.figure .level{stroke:var(--ink);stroke-width:2}
.figure .level.refused{stroke:var(--withheld);stroke-dasharray:2 2}
.figure .zero{stroke:var(--ink)}.figure .stem{stroke:var(--curve)}
.figure .bounds{stroke:var(--soft);stroke-width:1.2}
.figure .between{fill:var(--band)}
.figure .rule-detection,.figure .rule-quantitation{stroke:var(--estimated);
stroke-width:1.4}
.figure .rule-quantitation{stroke-dasharray:6 3}
.figure text.rule-name{fill:var(--estimated);paint-order:stroke;
stroke:var(--paper);stroke-width:4px;stroke-linejoin:round}
.figure .window{fill:var(--window)}
.figure .trace{stroke:var(--curve);stroke-width:1.2;stroke-linejoin:round}
.figure .smoothed{stroke:var(--ink);stroke-width:.8;stroke-linejoin:round}
.figure .baseline{stroke:var(--withheld);stroke-width:1.4}
.figure .foot{stroke:var(--withheld);stroke-width:5;stroke-opacity:.45}
.figure .foot-end{fill:var(--paper);stroke:var(--withheld);stroke-width:1.4}
.figure .fitted{stroke:var(--reportable);stroke-width:2;stroke-dasharray:7 3}
.figure .fitted.fails{stroke-dasharray:2 3}
.figure .part{stroke:var(--above-range);stroke-width:1.2;
stroke-dasharray:2 2}
.figure .noise{fill:var(--noise);stroke:var(--soft);stroke-width:.6;
stroke-dasharray:2 2}
.figure .noise-size{stroke:var(--soft);stroke-width:1.4}
.figure .residual{stroke:var(--curve);stroke-width:1;stroke-linejoin:round}
.figure .apex{stroke:var(--ink);stroke-width:1.6}
.figure text.small{font-size:11.5px;fill:var(--soft)}
.meaning{white-space:nowrap;margin-right:.9em}
.figure.swatch{display:inline-block;width:26px;height:12px;
margin-right:.35em;vertical-align:-.05em}
.figure .spread{fill:var(--noise);stroke:none}
.figure .without{stroke:var(--above-range);stroke-width:1.2;
stroke-dasharray:1.5 3}
.figure .found{fill:var(--paper);stroke:var(--curve);stroke-width:1.8}
.figure .ring{fill:none;stroke:var(--above-range);stroke-width:1.6;
stroke-dasharray:3 2}
.scale{--names:17rem;--numbers:10.5rem;max-width:none;margin:.8rem 0 .4rem}
.scale-body{position:relative}
.scale-ground{position:absolute;top:0;bottom:1.4rem;left:var(--names);
right:var(--numbers)}
.scale-ground svg,.scale-strip{display:block;width:100%}
.scale-ground svg{height:100%}
.scale-row{position:relative;display:grid;align-items:center;
grid-template-columns:var(--names) minmax(0,1fr) var(--numbers)}
.scale-row+.scale-row{border-top:1px solid var(--rule)}
.scale-head{font-size:.85rem;color:var(--soft);align-items:end}
.scale-name{font-size:.9rem;line-height:1.3;padding:.2rem .8rem .2rem 0;
overflow-wrap:anywhere}
.scale-name>span{display:inline-flex;flex-wrap:wrap;gap:0 .5em;
align-items:baseline}
.scale-name a{color:inherit;text-decoration-color:var(--rule)}
.governs .scale-name a{font-weight:700}
.scale-numbers{display:grid;grid-template-columns:1fr 1fr;gap:.6rem;
text-align:right;font-size:.9rem;font-variant-numeric:tabular-nums}
.scale-head .scale-numbers{font-size:.85rem}
.scale-why{grid-column:2/-1;font-size:.85rem;color:var(--soft);
padding-left:.6rem;line-height:1.3}
.scale-why span,.scale-others .scale-name span{background:var(--paper)}
.scale-others .scale-name,.scale-axis .scale-name{color:var(--soft)}
.tag{font-size:.82rem;white-space:nowrap;color:var(--soft)}
.tag .mark{margin-right:.25em}
.tag.not-valid,.not-valid .mark,.verdict.not-valid{color:var(--withheld)}
.tag.caution,.caution .mark,.verdict.caution{color:var(--estimated)}
.tag.rules{border:1px solid currentColor;border-radius:3px;padding:0 .3em;
color:var(--estimated)}
.scale-strip{overflow:visible}
.scale-strip use{fill:none;stroke:currentColor;stroke-width:1.6}
.scale-strip use.critical{fill:var(--paper);stroke:var(--curve);
stroke-width:1.6}
.scale-strip use.detection{fill:var(--paper);stroke:var(--curve);
stroke-width:2}
.scale-strip use.quantitation{fill:var(--curve);stroke:var(--paper);
stroke-width:1}
.scale-strip use.invalid{fill:var(--paper);stroke:var(--soft);
stroke-width:1.4}
.scale-strip use.struck{stroke:var(--withheld);stroke-width:1.2}
.scale-strip use.sample{background:none}
.scale-strip.swatch{width:26px}
.verdict{display:block;font-size:.82rem;font-weight:400;color:var(--soft)}
.objections{list-style:none;margin:.2rem 0 0;padding:0;font-size:.82rem;
font-weight:400;min-width:17rem;max-width:30rem}
.objections li{border-left:3px solid var(--rule);padding-left:.5rem;
margin:.2rem 0}
.objections .not-valid{border-color:var(--withheld)}
.objections .caution{border-color:var(--estimated)}
.limits td:last-child{min-width:16rem;width:48%;font-size:.85rem}
.limits th[scope=row]{min-width:11rem}
.limits .terms li{display:inline}
.limits .terms li:not(.remark)+li:not(.remark)::before{content:"; "}
.limits .terms .remark{display:block;color:var(--soft);margin-top:.3rem}
.panel{margin:1rem 0;border-left:2px solid var(--rule);padding-left:.8rem}
.panel summary{cursor:pointer}
.diagnostics td:last-child{min-width:18rem}
.weight{white-space:nowrap;margin-left:.8em}
.weight .reason{white-space:normal}
@media screen and (max-width:760px){.scale{--names:0px;--numbers:0px}
.scale-row{grid-template-columns:minmax(0,1fr) auto}
.scale-name{grid-column:1;padding-right:.4rem}
.scale-name>span{background:var(--paper)}
.scale-row>svg,.scale-why{grid-column:1/-1;grid-row:2}
.scale-numbers{grid-column:2;grid-row:1;gap:.8rem;background:var(--paper);
grid-template-columns:auto auto}
.scale-why{padding-left:0}
.figure text.fine{display:none}}
@media (max-width:640px){.figure text{font-size:15px}
.scale .figure text{font-size:12px}
.figure text.small{font-size:13px}}
@media print{.figures{grid-template-columns:1fr 1fr}
.scale{--names:13rem;--numbers:9rem}.objections{min-width:12rem}
.limits td:last-child,.diagnostics td:last-child{min-width:0}}
)css";

}  // namespace loqsmith
