import type { ReactNode } from 'react';
import { Glyph } from './Glyph.tsx';

interface Props {
  by: 'member' | 'coach' | 'measured';
  writer?: ReactNode;
  when?: string | undefined;
  /** For `<time datetime>`. */
  at?: string | undefined;
  children: ReactNode;
}

const PENCIL = { member: ' by-blue', coach: ' by-red', measured: '' };
const GLYPH = { member: 'tick', coach: 'caret', measured: 'rule' } as const;

/** Paper with the writer's mark: blue tick, red wedge, or the graphite rule for what was measured. */
export function NoteCard({ by, writer, when, at, children }: Props) {
  return (
    <div className={`note${PENCIL[by]}`}>
      <Glyph name={GLYPH[by]} />
      {writer && (
        <p className="who">
          <b>{writer}</b>
          {when && <time dateTime={at}>{when}</time>}
        </p>
      )}
      {children}
    </div>
  );
}
