import { useEffect, useRef, useState, type FormEvent } from 'react';
import { postJson, RequestError } from '#contracts/client';
import { SessionInput } from '#contracts/session';
import { useKept } from './hooks/useKept.ts';
import { Choice } from './ui/Choice.tsx';
import { ErrorSummary } from './ui/ErrorSummary.tsx';
import { NumberStepper } from './ui/NumberStepper.tsx';
import { RailButton } from './ui/RailButton.tsx';
import { TextField } from './ui/TextField.tsx';
import { Tread } from './ui/Tread.tsx';

export interface AskedItem {
  id: string;
  name: string;
  /** `3 × 12 reps` */
  asked: string;
  total: number;
  unitWord: string;
  step: number;
}

interface Props {
  sessionId: string;
  items: AskedItem[];
  minutes: number;
}

const EFFORT = Array.from({ length: 10 }, (_, index) => ({
  value: String(index + 1),
  label: String(index + 1),
}));
const PAIN = [
  { value: 'none', label: 'Nothing hurt' },
  { value: 'mild', label: 'Something spoke up' },
  { value: 'strong', label: 'Something hurt' },
] as const;

/** What was done, in few taps: as asked is filled in, minus and plus change it. Kept on the device until it is sent. */
export default function SessionIsland({ sessionId, items, minutes }: Props) {
  const start = {
    ...Object.fromEntries(items.map((item) => [item.id, String(item.total)])),
    effort: '',
    minutes: String(minutes),
    pain: 'none',
    painWhere: '',
    note: '',
  } as Record<string, string>;
  const { values, set, drop, key } = useKept(`session ${sessionId}`, start);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [busy, setBusy] = useState(false);
  const root = useRef<HTMLFormElement>(null);
  useEffect(() => root.current?.setAttribute('data-ready', ''), []);
  const value = (name: string) => values[name] ?? '';

  async function send(event: FormEvent) {
    event.preventDefault();
    if (busy) return;
    const parsed = SessionInput.safeParse({
      items: items.map(({ id }) => ({ id, doneTotal: value(id), pain: value('pain') })),
      effort: value('effort'),
      minutes: value('minutes'),
      pain: value('pain'),
      painWhere: value('painWhere'),
      note: value('note'),
    });
    if (!parsed.success) {
      setErrors(Object.fromEntries(parsed.error.issues.map((issue) => [nameOf(issue.path), issue.message])));
      return;
    }
    setBusy(true);
    try {
      await postJson(`/api/sessions/${sessionId}`, parsed.data, key);
      drop();
      window.location.assign(`/session/done?id=${sessionId}`);
    } catch (error) {
      const refused =
        error instanceof RequestError ? error : new RequestError('That did not work. Try again.', 0);
      setErrors(Object.keys(refused.fields).length > 0 ? refused.fields : { form: refused.message });
      setBusy(false);
    }
  }

  /** A fault in `items.1.doneTotal` belongs to the second movement's box. */
  function nameOf(path: PropertyKey[]): string {
    return path[0] === 'items' ? (items[Number(path[1])]?.id ?? 'form') : path.map(String).join('.');
  }

  return (
    <form ref={root} onSubmit={(event) => void send(event)} noValidate className="stack">
      <ErrorSummary errors={errors} />
      <p>Everything is filled in as asked. Change only what was different: all sets together.</p>
      {items.map((item) => (
        <div key={item.id}>
          <NumberStepper
            name={item.id}
            label={item.name}
            hint={`asked ${item.asked}, ${item.total} in all`}
            unit={item.unitWord}
            step={item.step}
            max={6000}
            value={value(item.id)}
            onValue={(typed) => set(item.id, typed)}
            error={errors[item.id]}
          />
          <RailButton onClick={() => set(item.id, '0')}>Could not</RailButton>
        </div>
      ))}
      <Choice
        name="effort"
        legend="How hard was the session? 1 nothing, 10 all there was"
        options={EFFORT}
        value={value('effort')}
        onValue={(typed) => set('effort', typed)}
        error={errors['effort']}
      />
      <Choice
        name="pain"
        legend="Did anything hurt?"
        hint="The burn of a working muscle is not pain. A joint, the back or the chest is."
        options={PAIN}
        value={value('pain') as 'none' | 'mild' | 'strong'}
        onValue={(typed) => set('pain', typed)}
        error={errors['pain']}
      />
      {value('pain') !== 'none' && (
        <TextField
          name="painWhere"
          label="Where?"
          maxLength={200}
          value={value('painWhere')}
          onValue={(typed) => set('painWhere', typed)}
          error={errors['painWhere']}
        />
      )}
      <NumberStepper
        name="minutes"
        label="Minutes"
        min={1}
        max={240}
        value={value('minutes')}
        onValue={(typed) => set('minutes', typed)}
        error={errors['minutes']}
      />
      <TextField
        name="note"
        label="A word to yourself or your coach"
        rows={2}
        maxLength={500}
        value={value('note')}
        onValue={(typed) => set('note', typed)}
        error={errors['note']}
      />
      <div>
        <Tread busy={busy} busyWords="Writing it down">
          Write it down
        </Tread>
      </div>
    </form>
  );
}
