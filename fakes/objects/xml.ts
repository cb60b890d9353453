const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

const UNESCAPES: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

export type Xml = string | number | boolean | Xml[] | { [name: string]: Xml };

/** `{ Key: 'a', Size: 1 }` → `<Key>a</Key><Size>1</Size>`; a list repeats its element. */
function render(value: Xml): string {
  if (Array.isArray(value)) return value.map(render).join('');
  if (typeof value !== 'object') return String(value).replace(/[&<>"]/g, (mark) => ESCAPES[mark] ?? mark);
  return Object.entries(value)
    .flatMap(([name, inner]) => [inner].flat().map((one) => `<${name}>${render(one)}</${name}>`))
    .join('');
}

export function xml(root: string, value: Xml, status = 200): Response {
  const text = `<?xml version="1.0" encoding="UTF-8"?><${root} xmlns="http://s3.amazonaws.com/doc/2006-03-01/">${render(value)}</${root}>`;
  return new Response(text, { status, headers: { 'content-type': 'application/xml' } });
}

/** The text of every `<name>` in a request. */
export const textsOf = (source: string, name: string): string[] =>
  [...source.matchAll(new RegExp(`<${name}>([^<]*)</${name}>`, 'g'))].map(([, text = '']) =>
    text.replace(/&(#x?[0-9a-fA-F]+|\w+);/g, (whole, code: string) => {
      if (!code.startsWith('#')) return UNESCAPES[code] ?? whole;
      const hex = code.startsWith('#x');
      return String.fromCodePoint(Number.parseInt(code.slice(hex ? 2 : 1), hex ? 16 : 10));
    }),
  );
