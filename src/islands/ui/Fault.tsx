import { Glyph } from './Glyph.tsx';

/** What is wrong with a field, between its label and its box. */
export function Fault({ id, children }: { id: string; children: string }) {
  return (
    <p className="fault" id={id}>
      <Glyph name="caution" />
      <span>{children}</span>
    </p>
  );
}

/** The ids that describe a field, for `aria-describedby`. */
export function describedBy(
  id: string,
  hint: string | undefined,
  error: string | undefined,
): string | undefined {
  return [hint && `${id}-hint`, error && `${id}-fault`].filter(Boolean).join(' ') || undefined;
}
