/** Text that is already safe HTML. */
export class Html {
  constructor(readonly text: string) {}
}

type Part = Html | string | number | null | undefined | false | Part[];

const ESCAPES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

function render(part: Part): string {
  if (part === null || part === undefined || part === false) return '';
  if (part instanceof Html) return part.text;
  if (Array.isArray(part)) return part.map(render).join('');
  return String(part).replace(/[&<>"']/g, (mark) => ESCAPES[mark] ?? mark);
}

/** Markup whose every value is escaped, unless it is markup made by this function. */
export function html(strings: TemplateStringsArray, ...parts: Part[]): Html {
  return new Html(strings.map((text, at) => text + render(at < parts.length ? parts[at] : null)).join(''));
}

/** Scripts never run on the stand-ins' pages, and nothing comes from another host. */
const POLICY =
  "default-src 'none'; style-src 'self'; img-src 'self' data:; frame-src 'self'; base-uri 'none'";

interface PageParts {
  title: string;
  /** The line in the green band on top: which stand-in this is, and that nothing is real. */
  band: string;
  body: Html;
  status?: number;
}

/** A whole page in Newel's calm look. */
export function page({ title, band, body, status = 200 }: PageParts): Response {
  const document = html`<!doctype html>
    <html lang="en-GB">
      <head>
        <meta charset="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <title>${title} · ${band}</title>
        <link rel="icon" href="data:," />
        <link rel="stylesheet" href="/_fake/style.css" />
      </head>
      <body>
        <a class="skip" href="#main">To the content</a>
        <header><p>${band}</p></header>
        <main id="main" tabindex="-1">${body}</main>
      </body>
    </html>`;
  return new Response(document.text, {
    status,
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy': POLICY,
      'cache-control': 'no-store',
      'referrer-policy': 'same-origin',
      'x-content-type-options': 'nosniff',
    },
  });
}

/** POST → redirect → GET. */
export const seeOther = (location: string) => new Response(null, { status: 303, headers: { location } });

export const json = (value: unknown, status = 200, headers: Record<string, string> = {}) =>
  new Response(JSON.stringify(value), {
    status,
    headers: { 'content-type': 'application/json', ...headers },
  });
