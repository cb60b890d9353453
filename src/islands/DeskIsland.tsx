import { QueryClientProvider, useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useState, type FormEvent, type KeyboardEvent } from 'react';
import { postJson, RequestError } from '#contracts/client';
import { AnswerInput, letterAfter, type RackLetter } from '#contracts/desk';
import { useDraft, type DraftBody } from './hooks/useDraft.ts';
import { deskClient, takeLetter, useRack } from './hooks/useRack.ts';
import { Glyph } from './ui/Glyph.tsx';
import { Status } from './ui/Status.tsx';
import { TextField } from './ui/TextField.tsx';
import { Tread } from './ui/Tread.tsx';

interface Props {
  /** The coach who writes. */
  owner: string;
  memberId: string;
  name: string;
  draft: DraftBody | null;
  rack: RackLetter[];
  /** When the rack was made, in milliseconds. */
  rackAt: number;
}

interface Sending {
  words: string;
  /** Chosen before the letter leaves the rack, since its place is gone afterwards. */
  next: RackLetter | undefined;
}

/** Alt with an arrow moves from anywhere; `j` and `k` only while nothing is being typed. */
function stepOf(event: globalThis.KeyboardEvent): -1 | 0 | 1 {
  if (event.altKey) return event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
  const at = event.target;
  const typing = at instanceof HTMLElement && at.closest('input, textarea, select') !== null;
  if (typing || event.ctrlKey || event.metaKey) return 0;
  return event.key === 'j' ? 1 : event.key === 'k' ? -1 : 0;
}

function Answer({ owner, memberId, name, draft, rack, rackAt }: Props) {
  const client = useQueryClient();
  const letters = useRack(rack, rackAt);
  const { values, set, kept, drop } = useDraft(owner, `answer:${memberId}`, { words: '', ...draft });
  const [fault, setFault] = useState('');
  const key = useRef('');
  const root = useRef<HTMLDivElement>(null);
  useEffect(() => {
    key.current = crypto.randomUUID();
    root.current?.setAttribute('data-ready', '');
  }, []);

  const answer = useMutation({
    // Without a line it fails at once and says so, instead of waiting unseen.
    networkMode: 'always',
    mutationFn: ({ words }: Sending) => postJson('/api/desk/answer', { memberId, words }, key.current),
    // The letter leaves the rack at once, and comes back when the sending fails.
    onMutate: () => takeLetter(client, memberId),
    onError: (error, _sending, putBack) => {
      putBack?.();
      setFault(
        `${error instanceof RequestError ? error.message : 'That did not go.'} The letter is back in the rack.`,
      );
    },
    onSuccess: (_reply, { next }) => {
      drop();
      window.location.assign(next ? `/desk/${next.memberId}?said=sent` : '/desk?said=sent');
    },
  });
  const next = answer.isPending ? answer.variables.next : letterAfter(letters, memberId);

  function send(event: FormEvent | KeyboardEvent) {
    event.preventDefault();
    if (answer.isPending) return;
    const parsed = AnswerInput.safeParse({ memberId, words: values.words });
    if (!parsed.success) return setFault(parsed.error.issues[0]?.message ?? '');
    setFault('');
    answer.mutate({ words: parsed.data.words, next });
  }

  useEffect(() => {
    const move = (event: globalThis.KeyboardEvent) => {
      const step = stepOf(event);
      const here = letters.findIndex((letter) => letter.memberId === memberId);
      const to = step === 0 ? undefined : letters[here + step];
      if (to) window.location.assign(`/desk/${to.memberId}`);
    };
    window.addEventListener('keydown', move);
    return () => window.removeEventListener('keydown', move);
  }, [letters, memberId]);

  return (
    <div ref={root}>
      <form onSubmit={send} noValidate className="stack">
        <TextField
          name="answer"
          label={
            <>
              <span className="mr-2 inline-block text-red">
                <Glyph name="caret" />
              </span>
              Your answer to {name}
            </>
          }
          hint="Ctrl and Enter sends. Alt and an arrow goes to the next letter; so do j and k outside the field."
          rows={6}
          maxLength={4000}
          value={values.words ?? ''}
          onValue={(words) => set('words', words)}
          onKeyDown={(event: KeyboardEvent) =>
            event.key === 'Enter' && (event.ctrlKey || event.metaKey) && send(event)
          }
          error={fault || undefined}
        />
        <div className="cluster">
          <Tread busy={answer.isPending} busyWords="Sending">
            {next ? `Send, next is ${next.name.split(' ')[0]}` : 'Send'}
          </Tread>
          <Status>{answer.isPending ? 'The letter has left the rack.' : kept}</Status>
        </div>
        <p className="soft text-15">
          {letters.length === 0 ? 'Nobody else waits.' : `${letters.length} in the rack.`}
        </p>
      </form>
    </div>
  );
}

/** The coach's answer beside the numbers, with the next letter a key away. */
export default function DeskIsland(props: Props) {
  const [client] = useState(deskClient);
  return (
    <QueryClientProvider client={client}>
      <Answer {...props} />
    </QueryClientProvider>
  );
}
