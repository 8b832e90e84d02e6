/** The page's style: a plain ground, one card, large targets; light and dark by the reader's choice, contrast 7 : 1. */
export const PAGE_STYLE = `
:root{--ground:#fbfaf7;--ink:#111;--grey:#474747;--earlier:#b4b0a8;--picked:#00695c;--tension:#b35806;--compression:#542788;--panel:#6f8f9f;--prop:#5a5a5a;--card:#fff;--line:#d6d2c8;--hold:#111;--hold-ink:#fff;color-scheme:light}
@media (prefers-color-scheme:dark){:root{--ground:#17181a;--ink:#f6f4ee;--grey:#c9c6bf;--earlier:#66686c;--picked:#4fd1bd;--tension:#f1a340;--compression:#b79be0;--panel:#7d9dae;--prop:#b9b9b9;--card:#212326;--line:#43464a;--hold:#f6f4ee;--hold-ink:#111;color-scheme:dark}}
:root.paper{--ground:#fff;--ink:#000;--grey:#333;--earlier:#999;--tension:#b35806;--compression:#542788;--panel:#6f8f9f;--prop:#555;--card:#fff;--line:#bbb;--hold:#000;--hold-ink:#fff;color-scheme:light}
*{box-sizing:border-box}
html,body{height:100%;margin:0}
body{display:flex;flex-direction:column;background:var(--ground);color:var(--ink);font:17px/1.4 "Atkinson Hyperlegible Next",system-ui,sans-serif}
h1{font-size:20px;margin:0}h2{font-size:18px;margin:0 0 6px}p{margin:0}
header{display:flex;flex-wrap:wrap;gap:8px 20px;align-items:center;padding:10px 16px}
header .name{flex:1 1 240px}header p{color:var(--grey);font-size:15px}#ticked{display:inline-block;white-space:nowrap}
form{display:flex;flex-wrap:wrap;gap:6px;align-items:center}
input[type=search]{width:7em}
button,input[type=search]{font:inherit;min-height:44px;padding:6px 14px;border:1.5px solid var(--line);border-radius:8px;background:var(--card);color:var(--ink)}
button{cursor:pointer}button[aria-pressed=true]{border-color:var(--ink);box-shadow:inset 0 -3px 0 var(--ink)}
button:disabled{color:var(--grey);cursor:default;opacity:.6}
:focus-visible{outline:3px solid var(--picked);outline-offset:2px}
.tools{display:flex;flex-wrap:wrap;gap:6px}
.hold{background:var(--hold);color:var(--hold-ink);padding:10px 16px}
main{position:relative;flex:1 1 auto;min-height:420px;overflow:hidden}
#stage{position:absolute;inset:0}
#truss,#marks{position:absolute;inset:0;width:100%;height:100%;display:block}
#truss{touch-action:none}#marks{pointer-events:none}
#no-picture{display:none;padding:40px 400px 0 24px;color:var(--grey)}.flat #no-picture{display:block}.flat #truss,.flat #marks{display:none}
#legend{position:absolute;left:16px;bottom:12px;background:var(--ground);padding:4px 8px}
#legend[hidden]{display:none}
#legend span{display:inline-block;width:34px;height:10px;vertical-align:middle;margin:0 4px 0 10px}
.pull{border:solid var(--tension);border-width:3px 0}.push{background:var(--compression)}
#card{position:absolute;right:16px;top:0;bottom:16px;width:370px;overflow:auto;background:var(--card);border:1px solid var(--line);border-radius:14px;padding:18px 18px 0;display:flex;flex-direction:column;gap:12px}
#count{color:var(--grey)}#say{font-size:23px;line-height:1.25;font-weight:700}
#notes{margin:0;padding-left:20px}#notes:empty{display:none}
#parts{list-style:none;margin:0;padding:0}
#parts li{display:flex;align-items:center;gap:8px;border-bottom:1px solid var(--line)}
.tick{flex:1;display:grid;grid-template-columns:28px auto 1fr;gap:10px;align-items:center;min-height:48px;padding:6px 0;cursor:pointer}
.tick input{width:24px;height:24px;margin:0;accent-color:var(--ink)}
.tick span{color:var(--grey);font-size:15px}
.mark{font-size:19px;font-variant-numeric:tabular-nums}.mark.node{border:1.5px solid;border-radius:99px;padding:1px 9px}.mark.panel{text-decoration:underline;text-underline-offset:3px}
.small{padding:4px 12px}
.go{display:flex;gap:10px;margin-top:auto;position:sticky;bottom:0;background:var(--card);padding:8px 0}.go button{flex:1;min-height:60px;font-size:21px;font-weight:700;border-color:var(--ink)}
#next{background:var(--ink);color:var(--card)}#next:disabled{background:var(--card);color:var(--grey)}
.slide{display:flex;gap:10px;align-items:center}.slide input{flex:1;min-height:44px;accent-color:var(--ink)}
#next-say,.caution{color:var(--grey);font-size:15px}.caution{padding-bottom:18px}
#picked{scroll-margin-bottom:96px;border:2px solid var(--picked);border-radius:10px;padding:12px}#picked[hidden]{display:none}
dl{display:grid;grid-template-columns:auto 1fr;gap:4px 12px;margin:0 0 10px}dt{color:var(--grey)}dd{margin:0;overflow-wrap:anywhere}
#found{position:absolute;left:16px;top:0;max-width:min(430px,calc(100% - 32px));max-height:calc(100% - 16px);overflow:auto;background:var(--card);border:1px solid var(--line);border-radius:14px;padding:16px}
#found[hidden]{display:none}#found ul{margin:0;padding-left:20px}
#all,#printed{display:none}
@media (max-width:800px){
header{padding:6px 12px;gap:6px 8px}header .name{flex-basis:100%}h1{font-size:17px}header p{font-size:13px}header label{font-size:14px}input[type=search]{width:5.5em}.tools{width:100%;gap:4px}.tools button,form button{padding:6px 5px;font-size:14px;flex:1 1 auto}form button{flex:none;padding:6px 12px}
main{min-height:460px}.hold{padding:6px 12px;font-size:14px;line-height:1.3;max-height:5.4em;overflow:auto}#no-picture{padding:20px}
#card{left:0;right:0;top:auto;bottom:0;width:auto;max-height:54%;border-radius:16px 16px 0 0;padding:12px 16px 0;gap:8px}
#say{font-size:20px}#legend{top:4px;bottom:auto}#next-say{padding-bottom:12px}.caution{display:none}
}
@media (prefers-reduced-motion:reduce){*{transition:none!important;animation:none!important;scroll-behavior:auto!important}}
@media print{
html,body{height:auto;background:#fff;color:#000}body{display:block}header form,.tools,.go,.slide,.small,#next-say,#picked,#no-picture{display:none!important}
main{display:block;min-height:0;overflow:visible}#stage{position:relative;inset:auto}#truss,#marks{display:none}#printed{display:block;width:100%;height:115mm;object-fit:contain}.flat #printed{display:none}#legend{position:static}
#card,#found{position:static;width:auto;max-width:none;max-height:none;overflow:visible;border:0;border-radius:0;padding:4mm 16px;display:block}#found[hidden]{display:none}
.tick{min-height:0}.hold{max-height:none;print-color-adjust:exact}.pull,.push{print-color-adjust:exact}.caution{display:block}
#all{display:block;padding:8mm;break-before:page}#all li{margin-bottom:2mm;break-inside:avoid}
}
`;
