import { QueryClientProvider } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { waitWords, type RackLetter } from '#contracts/desk';
import { deskClient, useRack } from './hooks/useRack.ts';
import { Glyph } from './ui/Glyph.tsx';

interface Props {
  memberId: string;
  rack: RackLetter[];
  /** When the rack was made, in milliseconds. */
  rackAt: number;
}

function Rack({ memberId, rack, rackAt }: Props) {
  const letters = useRack(rack, rackAt);
  const root = useRef<HTMLDivElement>(null);
  useEffect(() => root.current?.setAttribute('data-ready', ''), []);
  return (
    <div ref={root}>
      <p className="font-display text-26">{waitWords(letters.length)}</p>
      <ol role="list" className="mt-3">
        {letters.map((letter) => (
          <li
            key={letter.memberId}
            className={letter.memberId === memberId ? 'chosen' : letter.kind === 'stop' ? 'alarm' : ''}
          >
            <a
              href={`/desk/${letter.memberId}`}
              aria-current={letter.memberId === memberId ? 'true' : undefined}
              title={letter.why || undefined}
            >
              <Glyph name={letter.kind} />
              <span>
                <b>{letter.name}</b>
                <em>{letter.reason}</em>
                {letter.due && <small>{letter.due}</small>}
              </span>
            </a>
          </li>
        ))}
      </ol>
    </div>
  );
}

/** The rack beside an open letter. It shares its letters with the answer, so one that is sent leaves at once. */
export default function RackIsland(props: Props) {
  const [client] = useState(deskClient);
  return (
    <QueryClientProvider client={client}>
      <Rack {...props} />
    </QueryClientProvider>
  );
}
