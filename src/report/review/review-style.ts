/** Inline CSS of the review document. Its hash stands in the document's policy, so no other style can get in. */
export const reviewStyle = `
:root{color-scheme:light dark;--ink:#1d2226;--paper:#fdfdfb;--rule:#c3c6c4;--quiet:#555b5f;--warn:#7a4a00;--alert:#9c2410;--tint:#f1f2ee;--try:#4b3a8f;--try-tint:#f1eefb;--chart:#fdfdfb;--grid:#d9d9d9}
*{box-sizing:border-box}
html{scroll-padding-top:4rem}
body{margin:0;background:var(--paper);color:var(--ink);font:1rem/1.55 Charter,"Bitstream Charter","Source Serif 4",Cambria,Georgia,serif}
main,header,footer{max-width:62rem;margin:0 auto;padding:0 1.25rem}
header{padding-top:2rem}
h1,h2,h3,caption,th,label,legend,button,nav,.label{font-family:"Source Sans 3","Segoe UI","Helvetica Neue",Arial,"Liberation Sans",sans-serif}
h1{font-size:1.7rem;line-height:1.2;margin:0 0 .3rem;font-weight:600}
h2{font-size:1.25rem;line-height:1.3;margin:2.6rem 0 .7rem;padding-top:.5rem;border-top:1px solid var(--rule);font-weight:600}
h2 .label{color:var(--quiet);font-weight:400;margin-right:.6rem}
h3{font-size:1rem;margin:1.4rem 0 .3rem;font-weight:600}
p,li,dd{max-width:46rem;overflow-wrap:anywhere}
a{color:inherit;text-decoration-color:var(--quiet);text-underline-offset:.15em}
:focus-visible{outline:3px solid var(--try);outline-offset:2px}
nav ol{columns:3 14rem;padding-left:1.6rem;font-size:.9rem;line-height:1.7}
.lead{font-size:1.15rem;line-height:1.5}
.quiet{color:var(--quiet)}
dl{display:grid;grid-template-columns:minmax(9rem,max-content) 1fr;gap:.25rem 1.2rem;margin:.8rem 0}
dt{color:var(--quiet)}dd{margin:0;min-width:0}
.scroll{overflow-x:auto;margin:.8rem 0 .3rem}
.scroll.long{max-height:26rem;overflow-y:auto}
.long thead th{position:sticky;top:0;background:var(--paper)}
table{font-family:"Source Sans 3","Segoe UI","Helvetica Neue",Arial,"Liberation Sans",sans-serif;border-collapse:collapse;font-size:.88rem;font-variant-numeric:tabular-nums;line-height:1.4}
caption{text-align:left;font-weight:600;font-size:.95rem;padding:.3rem 0}
th,td{padding:.28rem .65rem;border-bottom:1px solid var(--rule);text-align:right;vertical-align:top}
tbody th,.t{text-align:left}
tbody th{font-weight:500;white-space:nowrap}
thead th{border-bottom:2px solid var(--ink);vertical-align:bottom;font-weight:600}
td{white-space:nowrap}.words td{text-align:left}td.t,.words td{white-space:normal;overflow-wrap:break-word;max-width:24rem}
.note{font-size:.88rem;color:var(--quiet);margin:.2rem 0 1rem}
figure{margin:1.2rem 0}
figcaption{font-size:.88rem;color:var(--quiet);max-width:46rem}
.drawing{overflow-x:auto}.drawing svg{display:block;min-width:36rem;max-width:100%;height:auto}
.caution{border-left:5px solid var(--alert);background:var(--tint);padding:.5rem 1rem .5rem 2.2rem;margin:.8rem 0}
.caution strong{color:var(--alert)}.warning strong{color:var(--warn)}
.methods{padding-left:0;list-style:none}.methods li{margin:0 0 1rem;max-width:52rem}
.equation{display:block;font-family:"STIX Two Text",Cambria,Georgia,serif;font-style:italic;font-size:1.02rem;padding:.15rem 0 .15rem 1.2rem}
.drawing text{font-size:12px;fill:var(--ink);font-family:"Helvetica Neue",Arial,"Liberation Sans",sans-serif}.drawing text[font-size="11"]{font-size:11px}.drawing text[font-size="14"]{font-size:14px}
.drawing text[fill="#0072b2"]{fill:#00639b}.drawing text[fill="#d55e00"]{fill:#b34a00}.drawing text[fill="#007a5a"]{fill:#006b4f}.drawing text[fill="#b0568a"]{fill:#9c4277}.drawing text[fill="#8a6d00"]{fill:#735b00}.drawing text[fill="#2b8cc4"]{fill:#1a6f9f}.drawing text[fill="#4d4d4d"]{fill:#4d4d4d}
.chart-paper{fill:var(--chart)}.chart-ink{stroke:var(--ink)}.chart-ink-fill{fill:var(--ink)}.chart-grid{stroke:var(--grid)}.chart-rim{stroke:var(--chart);stroke-width:3px;stroke-linejoin:round;paint-order:stroke}.chart-paper-line{stroke:var(--chart)}
.what-if{--chart:var(--try-tint);border:3px double var(--try);background:var(--try-tint);padding:0 1.1rem 1rem;margin:2rem 0}
.what-if h2{border:0;margin-top:1rem;color:var(--try)}
.what-if caption,.what-if figcaption,.what-if h3{color:var(--try)}
.what-if .scroll.long thead th,.what-if thead th{background:var(--try-tint)}
.controls{display:grid;grid-template-columns:repeat(auto-fill,minmax(17rem,1fr));gap:1rem;border:0;padding:0;margin:1rem 0}
.control{display:grid;gap:.25rem}
.control .pair{display:grid;grid-template-columns:8rem 1fr;gap:.6rem;align-items:center}
.control input{font:inherit;min-width:0;width:100%;accent-color:var(--try)}
.control input[type=number]{padding:.3rem .4rem;border:1px solid var(--quiet);border-radius:2px;background:var(--paper);color:var(--ink)}
.control.changed{outline:3px solid var(--try);outline-offset:.4rem}
.control.changed .issued{font-weight:700;color:var(--try)}
.issued{font-size:.85rem;color:var(--quiet)}
button{font:inherit;font-family:inherit;padding:.45rem 1.1rem;border:1px solid var(--ink);border-radius:2px;background:var(--paper);color:var(--ink);cursor:pointer}
button:disabled{color:var(--quiet);border-color:var(--rule);cursor:default}
.what-if details{border-top:1px solid var(--rule);padding:.4rem 0}
.what-if summary{cursor:pointer;padding:.3rem 0;font-weight:600}
.banner{position:sticky;top:0;z-index:2;background:var(--try);color:#fff;padding:.5rem 1.25rem;display:flex;flex-wrap:wrap;gap:.4rem 1rem;align-items:center}
.banner p{margin:0;max-width:none;flex:1 1 16rem}.banner a{color:#fff}.banner button{background:#fff;color:#1d2226;border-color:#fff}
[hidden]{display:none}
.moved{font-weight:700;color:var(--try)}
footer{border-top:1px solid var(--rule);margin-top:3rem;padding-top:1rem;padding-bottom:2rem;font-size:.88rem;color:var(--quiet)}
@media(max-width:40rem){dl{grid-template-columns:1fr;gap:0}dd{margin-bottom:.5rem}main,header,footer{padding-left:.9rem;padding-right:.9rem}h1{font-size:1.4rem}tbody th{position:sticky;left:0;background:var(--paper);max-width:11rem;min-width:5rem;white-space:normal;overflow-wrap:break-word}.what-if tbody th{background:var(--try-tint)}.what-if{padding:0 .7rem .8rem}}
@media screen and (prefers-color-scheme:dark){
:root{--ink:#e4e6e3;--paper:#15181a;--rule:#4a5053;--quiet:#b0b5b4;--warn:#f0b95a;--alert:#ff9c86;--tint:#1f2427;--try:#b9aaf5;--try-tint:#1e1b2c;--chart:#15181a;--grid:#3b4144}
.banner{background:#4b3a8f}
[fill="#0072b2"],.drawing text[fill="#0072b2"]{fill:#6bb8ea}[stroke="#0072b2"]{stroke:#6bb8ea}
[fill="#d55e00"],.drawing text[fill="#d55e00"]{fill:#f5945a}[stroke="#d55e00"]{stroke:#f5945a}
[fill="#007a5a"],.drawing text[fill="#007a5a"]{fill:#4fc9a3}[stroke="#007a5a"]{stroke:#4fc9a3}
[fill="#b0568a"],.drawing text[fill="#b0568a"]{fill:#e39cc5}[stroke="#b0568a"]{stroke:#e39cc5}
[fill="#8a6d00"],.drawing text[fill="#8a6d00"]{fill:#d9bb4a}[stroke="#8a6d00"]{stroke:#d9bb4a}
[fill="#2b8cc4"],.drawing text[fill="#2b8cc4"]{fill:#9fd3f2}[stroke="#2b8cc4"]{stroke:#9fd3f2}
[fill="#4d4d4d"],.drawing text[fill="#4d4d4d"]{fill:#c4c4c4}[stroke="#4d4d4d"]{stroke:#c4c4c4}
path[fill="#ffffff"],circle[fill="#ffffff"]{fill:var(--chart)}pattern [stroke="#ffffff"]{stroke:#15181a}
}
@page{size:A4;margin:16mm 14mm 18mm}
@media print{
:root{--ink:#000;--paper:#fff;--tint:#fff}
body{font-size:9.5pt}main,header,footer{max-width:none;padding:0}
h1{font-size:17pt}h2{font-size:12.5pt;margin-top:16pt}h2,h3,caption{break-after:avoid}
nav,.what-if,.banner,.screen-only{display:none!important}
.scroll,.scroll.long,.drawing{overflow:visible;max-height:none;max-width:100%}
table{font-size:7.4pt;width:100%}th,td{padding:1.4pt 3pt}tbody th{white-space:normal;overflow-wrap:anywhere;min-width:21ch}.note,figcaption{font-size:8pt}
thead{display:table-header-group}.long thead th{position:static}
tr,figure,li,dl,.caution li{break-inside:avoid}.scroll:not(.long){break-inside:avoid}
.drawing svg{min-width:0;width:100%;max-height:20cm}
p,li,dd{max-width:none}a{text-decoration:none}.lead{font-size:11pt}.caution{border-left-width:3pt}
}
`
