import {
  QueryClient,
  QueryClientProvider,
  useMutation,
  useQuery,
  useQueryClient,
} from '@tanstack/react-query';
import { useEffect, useRef, useState, type FormEvent, type KeyboardEvent } from 'react';
import { getJson, postJson, RequestError } from '#contracts/client';
import { AnswerInput, type RackLetter } from '#contracts/desk';
import { useDraft, type DraftBody } from './hooks/useDraft.ts';
import { Glyph } from './ui/Glyph.tsx';
import { Status } from './ui/Status.tsx';
import { TextField } from './ui/TextField.tsx';
import { Tread } from './ui/Tread.tsx';

interface Props {
  memberId: string;
  name: string;
  draft: DraftBody | null;
  rack: RackLetter[];
  /** When the rack was made, in milliseconds. */
  rackAt: number;
}

const RACK = ['rack'];

function Answer({ memberId, name, draft, rack, rackAt }: Props) {
  const client = useQueryClient();
  const { data: letters } = useQuery({
    queryKey: RACK,
    queryFn: () => getJson<RackLetter[]>('/api/desk/queue'),
    initialData: rack,
    initialDataUpdatedAt: rackAt,
    staleTime: 30_000,
    refetchOnWindowFocus: true,
  });
  const { values, set, kept, drop } = useDraft(`answer:${memberId}`, { words: '', ...draft });
  const [fault, setFault] = useState('');
  const key = useRef('');
  const root = useRef<HTMLDivElement>(null);
  useEffect(() => {
    key.current = crypto.randomUUID();
    root.current?.setAttribute('data-ready', '');
  }, []);

  const here = letters.findIndex((letter) => letter.memberId === memberId);
  const next = letters[here + 1] ?? letters.find((letter) => letter.memberId !== memberId);

  const answer = useMutation({
    mutationFn: (words: string) => postJson('/api/desk/answer', { memberId, words }, key.current),
    // The letter leaves the rack at once, and comes back when the sending fails.
    onMutate: async () => {
      await client.cancelQueries({ queryKey: RACK });
      const before = client.getQueryData<RackLetter[]>(RACK);
      client.setQueryData<RackLetter[]>(RACK, (now = []) =>
        now.filter((letter) => letter.memberId !== memberId),
      );
      return { before };
    },
    onError: (error, _words, context) => {
      client.setQueryData(RACK, context?.before);
      setFault(
        error instanceof RequestError ? error.message : 'That did not go. The letter is back in the rack.',
      );
    },
    onSuccess: () => {
      drop();
      window.location.assign(next ? `/desk/${next.memberId}?said=sent` : '/desk?said=sent');
    },
  });

  function send(event: FormEvent | KeyboardEvent) {
    event.preventDefault();
    if (answer.isPending) return;
    const parsed = AnswerInput.safeParse({ memberId, words: values.words });
    if (!parsed.success) return setFault(parsed.error.issues[0]?.message ?? '');
    setFault('');
    answer.mutate(parsed.data.words);
  }

  useEffect(() => {
    const move = (event: globalThis.KeyboardEvent) => {
      if (!event.altKey || (event.key !== 'ArrowDown' && event.key !== 'ArrowUp')) return;
      const to = letters[here + (event.key === 'ArrowDown' ? 1 : -1)];
      if (to) window.location.assign(`/desk/${to.memberId}`);
    };
    window.addEventListener('keydown', move);
    return () => window.removeEventListener('keydown', move);
  }, [letters, here]);

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
          hint="Ctrl and Enter sends. Alt and an arrow goes to the next letter."
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
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <Answer {...props} />
    </QueryClientProvider>
  );
}
