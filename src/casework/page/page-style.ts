/** Style sheet of a page, for screens from 320 pixels up and for paper. */
export const pageStyle: string = `
:root{--ink:#16262e;--quiet:#4d5f68;--line:#b9c4c6;--paper:#fffefb;--shade:#eef3f1;--accent:#0b5a6b;--warn:#8c1d18}
*{box-sizing:border-box}
html{-webkit-text-size-adjust:100%}
body{margin:0;background:var(--shade);color:var(--ink);font:16px/1.55 'Source Sans 3','Noto Sans','Segoe UI','DejaVu Sans',Verdana,sans-serif}
main{max-width:68rem;margin:0 auto;background:var(--paper);padding:0 clamp(1rem,4vw,3.5rem) 3rem;border-left:1px solid var(--line);border-right:1px solid var(--line);min-height:100vh}
header{border-bottom:1px solid var(--line);padding:2.2rem 0 1.4rem;margin-bottom:1.6rem}
h1,h2,h3,h4{line-height:1.25;overflow-wrap:anywhere}
h1{font-size:clamp(1.45rem,4.6vw,2.1rem);margin:0 0 .5rem;letter-spacing:-.01em}
h2{font-size:1.35rem;margin:2.2rem 0 .6rem}
h3{font-size:1.1rem;margin:1.6rem 0 .4rem}
p,li{max-width:46rem;overflow-wrap:anywhere}
a{color:var(--accent)}
.question{font-size:1.15rem;margin:.2rem 0 0;color:var(--ink)}
.about{color:var(--quiet);font-size:.9rem;margin:.5rem 0 0}
.answer{background:var(--accent);color:#fff;border-radius:2px 14px 14px 2px;padding:1rem 1.3rem;margin:1.2rem 0 0;max-width:50rem}
.answer b{display:block;font-size:.85rem;font-weight:600;margin-bottom:.2rem}
.answer p{margin:.2rem 0;font-size:1.2rem;font-weight:600;line-height:1.4;overflow-wrap:anywhere}
.answer .rest{font-size:.95rem;font-weight:400}
.code{margin:1.1rem 0 .3rem;color:var(--quiet);font-size:.88rem}
.code summary{cursor:pointer;padding:.15rem 0;width:max-content;max-width:100%}
pre{font:13px/1.45 'DejaVu Sans Mono','Liberation Mono',Consolas,monospace;overflow-x:auto;max-width:100%;margin:.3rem 0;padding:.6rem .8rem;background:var(--shade);border-left:3px solid var(--line)}
code{font:.88em 'DejaVu Sans Mono','Liberation Mono',Consolas,monospace;background:var(--shade);padding:.05em .25em}
pre code{background:none;padding:0;font:inherit}
.output{overflow-x:auto;max-width:100%;margin:.4rem 0 .9rem}
.output>pre{background:none;border-left-color:var(--accent)}
.output>pre.aside{border-left-color:var(--warn)}
.failed pre{border-left-color:var(--warn);background:#fbeeec;color:#5c120e}
.scroll{overflow-x:auto;max-width:100%}
.scroll table,.output>table,.output>div>table{border-collapse:collapse;font-size:.92rem}
.scroll th,.scroll td,.output>table th,.output>table td,.output>div>table th,.output>div>table td{border-bottom:1px solid var(--line);padding:.3em .8em;text-align:left;vertical-align:baseline}
img{max-width:100%;height:auto}
blockquote{margin:1rem 0;padding:.1rem 1rem;border-left:3px solid var(--line);color:var(--quiet)}
footer{margin-top:3rem;border-top:1px solid var(--line);padding-top:.7rem;color:var(--quiet);font-size:.88rem}
@page{margin:16mm 14mm}
@media print{
body,main{background:#fff}
body{font-size:10.5pt}
main{max-width:none;border:0;padding:0;min-height:0}
header{padding-top:0}
.answer{background:#fff;color:var(--ink);border:2px solid var(--accent)}
.code:not([open]){display:none}
.output,.scroll{overflow:visible}
pre{white-space:pre-wrap;overflow-wrap:anywhere}
h2,h3{break-after:avoid}
}`;
