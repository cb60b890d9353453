import { simpleParser, type AddressObject, type ParsedMail } from 'mailparser';
import type { DocStore } from '../core/doc-store.ts';

/** One mail as the inbox and its API show it. */
export interface Letter {
  id: string;
  /** When it arrived, ISO 8601. */
  at: string;
  from: string;
  /** Everyone it was handed in for, in lower case; blind copies too. */
  to: string[];
  subject: string;
  text: string;
  html: string | null;
  headers: { name: string; value: string }[];
  /** Every http address in it, in order, each once. */
  links: string[];
  attachments: { name: string; type: string; bytes: number }[];
}

export const LETTER = 'mail.letter';

const LINK = /https?:\/\/[^\s<>"')\]]+/g;

/** Links stand in the text part as they are and in the HTML part with `&amp;`. */
function linksIn(text: string, html: string | null): string[] {
  const found = [...text.matchAll(LINK), ...(html ?? '').replaceAll('&amp;', '&').matchAll(LINK)];
  return [...new Set(found.map(([link]) => link.replace(/[.,;:]+$/, '')))];
}

const addresses = (field: AddressObject | AddressObject[] | undefined) =>
  [field ?? []].flat().flatMap(({ value }) => value.flatMap(({ address }) => address ?? []));

/** Headers as they stood in the mail, folded lines joined. */
const headersOf = ({ headerLines }: ParsedMail) =>
  headerLines.map(({ line }) => {
    const colon = line.indexOf(':');
    return {
      name: line.slice(0, colon),
      value: line
        .slice(colon + 1)
        .replace(/\r?\n\s+/g, ' ')
        .trim(),
    };
  });

/** Reads a mail as it came over the wire and keeps it. */
export async function keepLetter(
  store: DocStore,
  { id, at, raw, recipients }: { id: string; at: Date; raw: Buffer; recipients: string[] },
): Promise<Letter> {
  const parsed = await simpleParser(raw);
  const text = parsed.text ?? '';
  const html = parsed.html || null;
  const letter: Letter = {
    id,
    at: at.toISOString(),
    from: addresses(parsed.from)[0] ?? '',
    to: [...new Set([...recipients, ...addresses(parsed.to)].map((address) => address.toLowerCase()))],
    subject: parsed.subject ?? '',
    text,
    html,
    headers: headersOf(parsed),
    links: linksIn(text, html),
    attachments: parsed.attachments.map(({ filename, contentType, size }) => ({
      name: filename ?? 'unnamed',
      type: contentType,
      bytes: size,
    })),
  };
  await store.put(LETTER, letter);
  return letter;
}

/** Newest first; only those to or from an address that contains `search`, when there is one. */
export async function findLetters(store: DocStore, search: string | null): Promise<Letter[]> {
  const all = await store.list<Letter>(LETTER);
  const wanted = search?.trim().toLowerCase();
  return wanted ? all.filter(({ to, from }) => [...to, from].some((one) => one.includes(wanted))) : all;
}
