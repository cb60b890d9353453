import { useEffect, useRef, useState, type FormEvent } from 'react';
import { MessageInput } from '#contracts/check-in';
import { postJson, RequestError } from '#contracts/client';
import { useDraft, type DraftBody } from './hooks/useDraft.ts';
import { RailButton } from './ui/RailButton.tsx';
import { Status } from './ui/Status.tsx';
import { TextField } from './ui/TextField.tsx';

interface Props {
  /** Who writes. */
  owner: string;
  draftKey: string;
  draft: DraftBody | null;
  coach: string;
}

/** A line to the coach between two check-ins. */
export default function MessageIsland({ owner, draftKey, draft, coach }: Props) {
  const { values, set, kept, drop } = useDraft(owner, draftKey, { words: '', ...draft });
  const [fault, setFault] = useState('');
  const [busy, setBusy] = useState(false);
  const key = useRef('');
  const root = useRef<HTMLFormElement>(null);
  useEffect(() => {
    key.current = crypto.randomUUID();
    root.current?.setAttribute('data-ready', '');
  }, []);

  async function send(event: FormEvent) {
    event.preventDefault();
    if (busy) return;
    const parsed = MessageInput.safeParse({ words: values.words });
    if (!parsed.success) return setFault(parsed.error.issues[0]?.message ?? '');
    setBusy(true);
    try {
      await postJson('/api/messages', parsed.data, key.current);
      drop();
      window.location.assign('/check-in?said=written#thread-end');
    } catch (error) {
      setFault(error instanceof RequestError ? error.message : 'That did not work. Try again.');
      setBusy(false);
    }
  }

  return (
    <form ref={root} onSubmit={(event) => void send(event)} noValidate className="stack">
      <TextField
        name="line"
        label={`A line to ${coach}`}
        rows={3}
        maxLength={4000}
        value={values.words}
        onValue={(value) => set('words', value)}
        error={fault || undefined}
      />
      <div className="cluster">
        <RailButton type="submit">{busy ? 'Sending' : 'Send the line'}</RailButton>
        <Status>{kept}</Status>
      </div>
    </form>
  );
}
