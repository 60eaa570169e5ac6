// How the report looks on a screen, down to 320 px.

export const pageStyle = `
:root{color-scheme:light;--paper:#eef1ed;--sheet:#fbfbf7;--ink:#1b2730;--soft:#4a5963;--rule:#aab4b5;--hair:#d5dad8;--deep:#12495f;--tint:#e3edee;--umber:#8f4f1f;
--serif:"Iowan Old Style","Palatino Linotype",Palatino,"Book Antiqua","URW Palladio L",Georgia,serif;--sans:"Source Sans 3","Source Sans Pro","Segoe UI",Candara,"Helvetica Neue",Arial,sans-serif}
*{box-sizing:border-box}
html{scroll-behavior:smooth;scroll-padding-top:4rem;-webkit-text-size-adjust:100%}
body{margin:0;background:var(--paper);color:var(--ink);font:1.0625rem/1.55 var(--sans)}
main{max-width:54rem;margin:0 auto;padding:2.5rem 3rem 4rem;background:var(--sheet);border:solid var(--hair);border-width:0 1px}
a{color:var(--deep)}
h1,h2,.question,.lead{font-family:var(--serif);font-weight:400;line-height:1.25;text-wrap:balance}
h1{font-size:2.5rem;letter-spacing:-.01em;margin:.4rem 0 .6rem;overflow-wrap:anywhere}
h2{font-size:1.65rem;margin:3.2rem 0 1rem;padding-top:.9rem;border-top:1px solid var(--ink);position:relative}
h2::before{content:"";position:absolute;left:0;right:0;top:2px;border-top:1px solid var(--hair)}
h3{font-size:1.15rem;margin:2rem 0 .5rem;line-height:1.3}
h4{font-size:1rem;margin:1.6rem 0 .3rem}
h5{font-size:1rem;margin:1rem 0 .3rem;font-weight:600;color:var(--deep)}
p{margin:.55rem 0;max-width:42rem;overflow-wrap:anywhere}
.skip{position:absolute;left:-100vw}
.skip:focus{left:1rem;top:1rem;background:var(--sheet);padding:.5rem 1rem;z-index:9}
.kind{display:flex;justify-content:space-between;flex-wrap:wrap;gap:.2rem 1rem;max-width:none;margin:0;padding-bottom:.5rem;border-bottom:1px solid var(--ink);color:var(--soft);font-size:.95rem}
.question{font-size:1.35rem;font-style:italic;color:var(--soft);margin:.2rem 0 .9rem}
.facts{display:flex;flex-wrap:wrap;gap:.1rem 1.4rem;color:var(--soft)}
.flag{display:inline-block;border:1px solid var(--umber);color:#6f3a12;padding:.15rem .7rem;font-size:.95rem}
nav{position:sticky;top:0;z-index:5;background:var(--sheet);margin:1.2rem -3rem 0;padding:.45rem 3rem;border-bottom:1px solid var(--hair);font-size:.95rem}
nav ul{display:flex;flex-wrap:wrap;gap:.1rem 1.3rem;list-style:none;margin:0;padding:0}
nav a{display:inline-block;padding:.15rem 0;text-decoration:none;border-bottom:1px solid transparent}
nav a:hover{border-color:currentColor}
#answer h2{margin-top:1.8rem}
.answer{display:grid;grid-template-columns:1fr auto;gap:1.5rem 2.5rem;align-items:start}
.lead{font-size:1.6rem;margin:0 0 .8rem}
.lead strong{font-weight:400;background:linear-gradient(transparent 62%,#c5dadf 62%)}
.futures{margin:.3rem 0 0;max-width:21.25rem}
.futures svg{width:100%;height:auto}
figcaption,.note,.definition{color:var(--soft);font-size:.95rem;line-height:1.45;max-width:42rem}
.sure{margin-top:1.1rem;padding-left:1.1rem;border-left:3px solid var(--hair)}
figure{margin:1rem 0 1.5rem}
figure svg{display:block;max-width:100%;height:auto}
figcaption{margin-top:.5rem}
.narrow,.paper{display:none}
.scroll{overflow-x:auto;margin:.8rem 0}
.long{content-visibility:auto;contain-intrinsic-block-size:auto 200rem}
table{border-collapse:collapse;font-size:.95rem;line-height:1.35;font-variant-numeric:tabular-nums}
caption{text-align:left;color:var(--soft);padding:0 0 .35rem}
th,td{padding:.32rem .9rem .32rem 0;text-align:right;vertical-align:top;border-bottom:1px solid var(--hair)}
thead th{border-bottom:1px solid var(--ink);font-weight:600;vertical-align:bottom;max-width:11rem}
th:first-child{text-align:left}
tbody th{font-weight:400}
th small{display:block;color:var(--soft);font-size:.9rem;max-width:19rem}
.words{text-align:left}
th[scope=rowgroup]{font-weight:600;max-width:17rem}
th small{font-weight:400}
.outcomes{width:100%}
.outcomes th,.outcomes td{text-align:left}
.outcomes tbody tr:first-child>:not([scope=rowgroup]){border-bottom-style:dotted}
dl{margin:1rem 0}
.numbers div,.concepts div{display:grid;grid-template-columns:14rem 1fr;gap:.1rem 1.2rem;padding:.35rem 0;border-bottom:1px solid var(--hair)}
dt{color:var(--soft)}dd{margin:0;overflow-wrap:anywhere}
details{margin:.6rem 0}
summary{cursor:pointer;padding:.3rem 0;color:var(--deep)}
pre{background:var(--tint);padding:1rem;overflow:auto;font:0.85rem/1.5 ui-monospace,"SF Mono",Menlo,Consolas,"DejaVu Sans Mono",monospace;tab-size:2}
code{font:0.92em ui-monospace,"SF Mono",Menlo,Consolas,"DejaVu Sans Mono",monospace;overflow-wrap:anywhere}
.readout{color:var(--soft)}
.beside{display:grid;grid-template-columns:repeat(auto-fit,minmax(min(100%,20rem),1fr));gap:0 2rem}
.beside figure{display:flex;flex-direction:column;margin:0 0 1.5rem}.beside figure svg{width:100%;max-width:26rem}.beside .definition{flex:1}.beside h3{margin-top:1rem}
.smalls{display:grid;grid-template-columns:repeat(auto-fill,minmax(10.2rem,1fr));gap:1rem;margin:1rem 0}
.smalls svg{width:100%;height:auto;display:block}
.smalls>div{min-width:0;content-visibility:auto;contain-intrinsic-size:auto 172px auto 130px}.smalls:not(.plans)>div{aspect-ratio:172/130}
.plans{width:100%}.plans th,.plans td{text-align:left;padding-right:.9rem}.plans thead th{max-width:none}.plans tbody th{min-width:8rem}.plans td small{display:block;color:var(--soft);font-size:.86rem}.plans .chosen{color:var(--deep);font-weight:600}.paper{display:none}.actions{padding-left:1.2rem;font-size:.98rem}.answer .note{max-width:21.25rem}
.pair{display:grid;grid-template-columns:repeat(auto-fit,minmax(min(100%,20rem),1fr));gap:.5rem 1rem}.pair figcaption,.pair .save{grid-column:1/-1}.pair svg{width:100%}
.smalls.plans>div{content-visibility:visible}.smalls.plans{grid-template-columns:repeat(auto-fill,minmax(13rem,1fr))}
select{font:inherit;font-size:.95rem;max-width:14rem;min-height:1.9rem;color:var(--ink);background:var(--sheet);border:1px solid var(--rule);border-radius:2px}input[type=checkbox]{accent-color:var(--deep);width:1.1rem;height:1.1rem;margin:0}
.blank{border-bottom:1px solid var(--rule);min-height:1.6em}
.limits li{margin:.5rem 0;max-width:42rem}
.controls{display:flex;flex-wrap:wrap;gap:.6rem 2rem;align-items:center;margin:.8rem 0}
.controls[hidden]{display:none}
@media (scripting:enabled){.controls[hidden]{display:flex;visibility:hidden}}
.year{display:flex;flex-wrap:wrap;align-items:center;gap:.7rem;flex:1 1 22rem}
.year input{flex:1 1 8rem;min-width:8rem;height:1.75rem;accent-color:var(--deep)}
.year output{font:1.25rem var(--serif);min-width:3.2rem}
fieldset{border:0;margin:0;padding:0;display:flex;flex-wrap:wrap;gap:.2rem 1.1rem}
legend{float:left;margin-right:1rem;color:var(--soft)}
label{display:inline-flex;gap:.35rem;align-items:center;min-height:1.75rem}
input[type=radio]{accent-color:var(--deep);width:1.1rem;height:1.1rem;margin:0}
button{font:inherit;font-size:.95rem;min-height:1.9rem;padding:.15rem .9rem;color:var(--deep);background:transparent;border:1px solid var(--deep);border-radius:1rem;cursor:pointer}
button:hover{background:var(--tint)}
#play{min-width:5.2rem;background:var(--deep);color:#fff}
#play:hover{background:#0d3a4e}
.save{display:flex;gap:.5rem;margin-top:.5rem}
.save button{border-color:var(--rule);font-size:.88rem;padding:.05rem .7rem}
:focus-visible{outline:3px solid var(--umber);outline-offset:2px}
.patch{cursor:pointer}
.patch:focus,.patch:focus-visible{outline:none}
.patch:hover .halo{stroke:var(--deep);stroke-width:1.5}
.patch:focus-visible .halo{stroke:var(--umber);stroke-width:3}
.patch:hover .halo.under{stroke-width:6}
.patch:focus-visible .halo.under{stroke-width:10}
[data-link]:hover{fill-opacity:.95}
.tip{position:absolute;z-index:8;max-width:19rem;background:var(--ink);color:#fff;padding:.5rem .8rem;font-size:.92rem;line-height:1.4;border-radius:2px;pointer-events:auto}
.tip strong{display:block;font-weight:600}
.tip span{display:block}
.readout{min-height:1.5em;font-size:.95rem;margin:.2rem 0 0;max-width:none}
footer{margin-top:3rem;padding-top:.7rem;border-top:1px solid var(--ink);color:var(--soft);font-size:.92rem}
@media (max-width:56rem){main{padding:1.6rem 1.5rem 3rem;border:0}nav{margin:1.2rem -1.5rem 0;padding:.45rem 1.5rem}}
@media (max-width:48rem){.answer{grid-template-columns:1fr}}
@media (max-width:40rem){body{font-size:1rem}main{padding:1.2rem 1.1rem 3rem}nav{margin:1rem -1.1rem 0;padding:.4rem 1.1rem;position:static}h1{font-size:1.9rem}h2{font-size:1.4rem;margin-top:2.4rem}.lead{font-size:1.35rem}.question{font-size:1.15rem}.wide{display:none}.narrow{display:block}.numbers div,.concepts div{grid-template-columns:1fr}.steady svg{max-width:none}.smalls{grid-template-columns:1fr 1fr;gap:.8rem}.outcomes thead{display:none}.outcomes,.outcomes caption,.outcomes tbody,.outcomes tr,.outcomes th,.outcomes td{display:block;max-width:none}.outcomes th,.outcomes td{border:0;padding:.1rem 0}.outcomes tbody{border-bottom:1px solid var(--hair);padding:.5rem 0}.outcomes tr{padding:.35rem 0}.outcomes tr>th[scope=row]{color:var(--soft)}.outcomes tr>td:nth-last-child(2)::before{content:"from the number of runs: "}.outcomes tr>td:last-child::before{content:"from what is not known: "}table.plans thead{display:none}table.plans,table.plans caption,table.plans tbody,table.plans tr,table.plans th{display:block}table.plans tbody th{border:0;padding:.6rem 0 .2rem;font-weight:600}table.plans td{display:grid;grid-template-columns:8.5rem 1fr;gap:0 .8rem;border:0;padding:.2rem 0}table.plans td::before{content:attr(data-plan);overflow-wrap:anywhere}table.plans td>*,table.plans td{grid-column:2}table.plans td::before{grid-column:1;grid-row:1/9;color:var(--deep)}table.plans tr{border-bottom:1px solid var(--hair);padding-bottom:.5rem}}
@media (prefers-reduced-motion:reduce){html{scroll-behavior:auto}}
@media (forced-colors:active){figure svg{forced-color-adjust:none}}
`;
