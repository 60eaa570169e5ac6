// How the report looks on paper: the summary on two pages, the annex after it, everything unfolded.

export function printStyle(foot: string): string {
  const safe = foot.replace(/[^\w .:·-]/g, '');
  return `
@page{margin:15mm 16mm 17mm;@bottom-left{content:"${safe}";font:8.5pt sans-serif;color:#4a5963}@bottom-right{content:"page " counter(page) " of " counter(pages);font:8.5pt sans-serif;color:#4a5963}}
@media print{
html,body{background:#fff}
body{font-size:9.6pt;line-height:1.42}
main{padding:0;border:0;max-width:none;background:#fff}
nav,.controls,.save,.skip,.readout,.tip,footer{display:none!important}
.wide,.paper{display:block!important}.narrow{display:none!important}
#outcomes tbody:nth-of-type(n+5){display:none}
h1{font-size:22pt;margin:.2rem 0}h3{font-size:11pt;margin:.8rem 0 .3rem}h4,h5{font-size:9.8pt;margin:.6rem 0 .2rem}h2{font-size:14.5pt;margin:1.1rem 0 .4rem;padding-top:.45rem;break-after:avoid}h3,h4,h5{break-after:avoid}
.question{font-size:12.5pt;margin:.1rem 0 .3rem}.lead{font-size:14pt;margin-bottom:.4rem}
p{max-width:none;margin:.3rem 0}figcaption,.note,.definition{font-size:8.8pt;max-width:none}
.answer{grid-template-columns:1fr auto;gap:1rem}.futures{max-width:13rem}.sure{margin-top:.4rem}
.lead strong{text-decoration:underline;text-decoration-thickness:1.5pt;text-underline-offset:3pt;background:none}
table,th small{font-size:8.8pt}.scroll{overflow:visible;margin:.4rem 0}.long{content-visibility:visible}th,td{padding:.12rem .6rem .12rem 0}
tr,figure,dl div{break-inside:avoid}
figure{margin:.5rem 0 .7rem}#map{break-before:page}#map h2{margin-top:0}

.map svg{max-height:112mm;width:auto;margin:0 auto}
.chart .wide svg,.still .wide svg{max-height:62mm;width:auto}
.beside{grid-template-columns:repeat(auto-fit,minmax(54mm,1fr));gap:0 1rem}.beside figure{margin:.2rem 0}.beside figure:nth-child(4){break-before:page}.beside h3{margin:.3rem 0 0;font-size:10.5pt}.beside .definition{margin:0;font-size:8.4pt;line-height:1.3}
svg>rect:first-of-type{fill:#fff}
.pages{break-before:page}.more{break-before:auto}
.summary .lead{font-size:12pt;line-height:1.25}.summary .sure p{font-size:8.8pt;margin:.15rem 0}.summary .actions{display:none}.paper{display:block}.summary .plans th,.summary .plans td{font-size:8.2pt;padding:.1rem .5rem .1rem 0}.summary .plans small{font-size:7.4pt;line-height:1.2}.summary .plans .more{display:none}.summary h2{margin:.5rem 0 .2rem}.summary #map-figure,.summary #side-by-side{display:none}.summary figure.futures{margin:.1rem 0;max-width:9.5rem}.summary .answer p{margin:.2rem 0}.summary .answer .note{max-width:9.5rem}.pair{grid-template-columns:1fr 1fr}.pair svg{max-height:82mm}.plans td small{white-space:normal;font-size:8.2pt}.smalls.plans{grid-template-columns:repeat(3,1fr)!important}
.smalls{grid-template-columns:repeat(4,1fr);gap:.5rem}.smalls>div{content-visibility:visible}
dl{margin:.4rem 0}.numbers div,.concepts div{grid-template-columns:11rem 1fr;padding:.1rem 0}
details::details-content{content-visibility:visible!important;display:block!important;height:auto!important}
summary{list-style:none;color:var(--ink);font-weight:600}
#map details{display:none}
pre{white-space:pre-wrap;font-size:7.6pt;background:#fff;border:1px solid #aab4b5}
a{color:inherit;text-decoration:none}
}`;
}
