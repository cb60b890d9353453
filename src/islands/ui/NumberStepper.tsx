import { describedBy, Fault } from './Fault.tsx';

interface Props {
  name: string;
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  /** As typed: `12,5` stays as it is until a button is pressed. */
  value: string;
  onValue: (value: string) => void;
  min?: number;
  max?: number;
  step?: number;
  unit?: string | undefined;
}

/** Minus, number, plus. The number can be typed as people type it. */
export function NumberStepper(props: Props) {
  const { name, label, hint, error, value, onValue, min = 0, max = Infinity, step = 1, unit } = props;
  const move = (by: number) => {
    const now = Number(value.replace(',', '.')) || 0;
    // Sums of tenths stay tenths.
    onValue(String(Math.round(Math.min(max, Math.max(min, now + by)) * 100) / 100));
  };
  return (
    <div className={error ? 'field faulty' : 'field'}>
      <label htmlFor={name}>{label}</label>
      {hint && (
        <span className="hint" id={`${name}-hint`}>
          {hint}
        </span>
      )}
      {error && <Fault id={`${name}-fault`}>{error}</Fault>}
      <div className="stepper">
        <button
          className="railbtn"
          type="button"
          aria-label={`${label}: ${step} fewer`}
          onClick={() => move(-step)}
        >
          −
        </button>
        <input
          className="box"
          id={name}
          name={name}
          value={value}
          inputMode="decimal"
          autoComplete="off"
          aria-describedby={describedBy(name, hint, error)}
          aria-invalid={error ? true : undefined}
          onChange={(event) => onValue(event.target.value)}
        />
        <button
          className="railbtn"
          type="button"
          aria-label={`${label}: ${step} more`}
          onClick={() => move(step)}
        >
          +
        </button>
        {unit && <span>{unit}</span>}
      </div>
    </div>
  );
}
