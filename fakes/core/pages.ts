/** Text made safe for HTML. */
export const esc = (value: unknown): string =>
  String(value ?? '').replace(/[&<>"']/g, (char) => `&#${char.charCodeAt(0)};`);

const STYLE = `:root{color-scheme:light dark;--wall:light-dark(#d1e6d9,#2e3122);--wood:light-dark(#fbfbf7,#423f30);--ink:light-dark(#13201a,#f5f0e0);--ink-2:light-dark(#3a4d44,#cdc8b2);--line:light-dark(#667c71,#93947f);--rail:light-dark(#65371f,#7a482c)}
*{box-sizing:border-box}body{margin:0;background:var(--wall);color:var(--ink);font:17px/1.55 system-ui,sans-serif}
main{max-width:46rem;margin:0 auto;padding:2rem 1.25rem 4rem}h1,h2{font-family:Georgia,serif;font-weight:500;line-height:1.15}
.strip{background:#f6d236;color:#1a1606;padding:.6rem 1.25rem;font-weight:600;text-align:center}
.panel{background:var(--wood);padding:1.5rem;margin:1.25rem 0;border-radius:2px}table{border-collapse:collapse;width:100%}td,th{border-bottom:1px solid var(--line);padding:.5rem;text-align:left;vertical-align:top;overflow-wrap:anywhere}
label{display:block;padding:.5rem 0}input[type=text]{font:inherit;width:100%;min-height:48px;padding:.5rem .75rem;background:var(--wood);color:inherit;border:1px solid var(--line);border-radius:2px}
button,.button{display:inline-block;font:inherit;font-weight:600;min-height:48px;padding:.7rem 1.3rem;background:var(--rail);color:#fdf9f0;border:0;border-radius:2px;cursor:pointer;text-decoration:none}
button.second{background:var(--wood);color:var(--ink);border:1px solid var(--line)}a{color:inherit}.soft{color:var(--ink-2);font-size:.9375rem}.sum{font-size:1.6rem;font-weight:700}.fault{border-left:6px solid #f6d236;padding-left:.75rem;font-weight:600}
form.inline{display:inline}:focus-visible{outline:3px solid var(--ink);outline-offset:3px}`;

/** A page of a stand-in, in the product's colours, saying plainly that it is one. */
export function page(title: string, strip: string, body: string, status = 200): Response {
  const html = `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${esc(title)}</title><link rel="stylesheet" href="/style.css"></head><body><p class="strip" role="note" style="margin:0">${esc(strip)}</p><main><h1>${esc(title)}</h1>${body}</main></body></html>`;
  return new Response(html, {
    status,
    headers: { 'content-type': 'text/html; charset=utf-8', 'cache-control': 'no-store' },
  });
}

export const stylesheet = (): Response =>
  new Response(STYLE, { headers: { 'content-type': 'text/css; charset=utf-8' } });

export const redirect = (to: string): Response =>
  new Response(null, { status: 303, headers: { location: to } });
