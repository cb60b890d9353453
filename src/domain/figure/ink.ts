/** Colours of a drawing; `.figure` in the style sheet sets them for wall, dado and film. */
export const INK = {
  ink: 'var(--fig-ink,currentColor)',
  far: 'var(--fig-far,#999)',
  body: 'var(--fig-body,#fff)',
  cloth: 'var(--fig-cloth,#ccd)',
  prop: 'var(--fig-prop,#887)',
  mend: 'var(--fig-accent-blue,#25b)',
  fault: 'var(--fig-accent-red,#b32)',
  graphite: 'var(--fig-graphite,#666)',
  hair: 'var(--fig-hair,var(--fig-ink,#222))',
} as const;

/** A path element; nothing for an empty path. */
export const path = (d: string, attributes = ''): string => (d ? `<path${attributes} d="${d}"/>` : '');
/** A group; nothing when empty. */
export const group = (attributes: string, content: string): string =>
  content ? `<g ${attributes}>${content}</g>` : '';
