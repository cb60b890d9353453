/** A glyph of the page's sprite; decoration, a word stands beside it. */
export function Glyph({ name }: { name: 'tick' | 'caret' | 'rule' | 'caution' | 'stop' | 'clip' | 'stair' }) {
  return (
    <svg className="glyph" viewBox="0 0 20 20" aria-hidden="true">
      <use href={`#g-${name}`} />
    </svg>
  );
}
