import { useEffect, useRef, useState, type FormEvent } from 'react';
import { CheckInInput } from '#contracts/check-in';
import { postJson, RequestError } from '#contracts/client';
import { useDraft, type DraftBody } from './hooks/useDraft.ts';
import { PhotoField } from './PhotoField.tsx';
import { Choice } from './ui/Choice.tsx';
import { ErrorSummary } from './ui/ErrorSummary.tsx';
import { Status } from './ui/Status.tsx';
import { TextField } from './ui/TextField.tsx';
import { Tread } from './ui/Tread.tsx';

interface Props {
  /** Who writes. */
  owner: string;
  draftKey: string;
  draft: DraftBody | null;
  coach: string;
}

const EMPTY = {
  words: '',
  went: '',
  sleep: '',
  soreness: '',
  effort: '',
  pain: 'none',
  painWhere: '',
  photoId: null as string | null,
};

const five = (words: readonly [string, string, string, string, string]) =>
  words.map((label, index) => ({ value: String(index + 1), label }));
const WENT = five(['badly', 'so-so', 'fairly', 'well', 'very well']);
const SLEEP = five(['hardly', 'badly', 'fairly', 'well', 'very well']);
const SORENESS = five(['not at all', 'a little', 'somewhat', 'quite', 'very']);
const EFFORT = Array.from({ length: 10 }, (_, index) => ({
  value: String(index + 1),
  label: String(index + 1),
}));
const PAIN = [
  { value: 'none', label: 'Nothing hurt' },
  { value: 'mild', label: 'Something spoke up' },
  { value: 'strong', label: 'Something hurt' },
];

/** The weekly check-in. Every key press is kept; sending twice with one key stores once. */
export default function CheckInIsland({ owner, draftKey, draft, coach }: Props) {
  const { values, set, kept, drop } = useDraft(owner, draftKey, { ...EMPTY, ...draft });
  const [errors, setErrors] = useState<Record<string, string>>({});
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
    const parsed = CheckInInput.safeParse(values);
    if (!parsed.success) {
      setErrors(
        Object.fromEntries(parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message])),
      );
      return;
    }
    setBusy(true);
    try {
      await postJson('/api/check-ins', parsed.data, key.current);
      drop();
      window.location.assign('/check-in?said=sent');
    } catch (error) {
      const refused =
        error instanceof RequestError ? error : new RequestError('That did not work. Try again.', 0);
      setErrors(Object.keys(refused.fields).length > 0 ? refused.fields : { form: refused.message });
      setBusy(false);
    }
  }

  const choice = (
    name: 'went' | 'sleep' | 'soreness' | 'effort' | 'pain',
    legend: string,
    options: typeof WENT,
  ) => (
    <Choice
      name={name}
      legend={legend}
      options={options}
      value={values[name]}
      onValue={(value) => set(name, value)}
      error={errors[name]}
    />
  );

  return (
    <form ref={root} onSubmit={(event) => void send(event)} noValidate className="stack">
      <ErrorSummary errors={errors} />
      <TextField
        name="words"
        label="In your words"
        hint="What was done, what got in the way, what you would like to know."
        rows={6}
        maxLength={4000}
        value={values.words}
        onValue={(value) => set('words', value)}
        error={errors['words']}
      />
      {choice('went', 'The week went', WENT)}
      {choice('sleep', 'You slept', SLEEP)}
      {choice('soreness', 'You were sore', SORENESS)}
      {choice('effort', 'Effort of the week, 1 to 10', EFFORT)}
      {choice('pain', 'Did anything hurt?', PAIN)}
      {values.pain !== 'none' && (
        <TextField
          name="painWhere"
          label="Where, and when"
          value={values.painWhere}
          maxLength={200}
          onValue={(value) => set('painWhere', value)}
          error={errors['painWhere']}
        />
      )}
      <PhotoField photoId={values.photoId} onPhoto={(id) => set('photoId', id)} error={errors['photoId']} />
      <div className="cluster">
        <Tread busy={busy} busyWords="Sending">
          Send to {coach}
        </Tread>
        <Status>{kept}</Status>
      </div>
    </form>
  );
}
