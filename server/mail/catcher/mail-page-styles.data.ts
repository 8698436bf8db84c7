/** Paper and ink, as everywhere else, without the client's build. */
export const MAIL_PAGE_STYLES = `
:root{color-scheme:light dark;--paper:#F6F3EA;--sheet:#FFFDF7;--rule:#DCE3DC;--ink:#14343A;--ink-2:#4A6468;--focus:#0B6E8E}
@media (prefers-color-scheme:dark){:root{--paper:#0D1B1E;--sheet:#122529;--rule:#22393D;--ink:#E4EEEA;--ink-2:#A3B8B8;--focus:#5CC8E8}}
*{box-sizing:border-box}
body{margin:0;background:var(--paper);color:var(--ink);font:17px/1.45 system-ui,sans-serif}
main,header{max-width:60rem;margin:0 auto;padding:0 1rem}
h1{font-size:27px;line-height:1.2;margin:1.5rem 0 .25rem}
p{margin:.25rem 0 1rem;color:var(--ink-2)}
a{color:inherit}
:focus-visible{outline:3px solid var(--focus);outline-offset:2px}
ol{list-style:none;margin:0;padding:0;border:1px solid var(--ink);background:var(--sheet)}
li{border-top:1px solid var(--rule)}
li:first-child{border-top:0}
li a{display:block;padding:.75rem 1rem;min-height:48px;text-decoration:none}
li a:hover{background:var(--paper)}
li b{display:block}
li span,dl{color:var(--ink-2);font-size:15px}
time{font-family:ui-monospace,monospace}
dl{display:grid;grid-template-columns:max-content 1fr;gap:.25rem 1rem;margin:0 0 1rem}
dt,dd{margin:0;overflow-wrap:anywhere}
pre{white-space:pre-wrap;overflow-wrap:anywhere;background:var(--sheet);border:1px solid var(--ink);padding:1rem;font:15px/1.45 ui-monospace,monospace}
iframe{width:100%;height:44rem;border:1px solid var(--ink);background:#FFFDF7}
.empty{border:1px solid var(--ink);background:var(--sheet);padding:2rem 1rem}
`;
