import type { ReactNode } from 'react';
import { describedBy, Fault } from './Fault.tsx';

interface Props<T extends string> {
  name: string;
  legend: ReactNode;
  hint?: string | undefined;
  error?: string | undefined;
  options: readonly { value: T; label: string; note?: string | undefined }[];
  value: T | undefined;
  onValue: (value: T) => void;
  /** One under the other, for whole sentences. */
  long?: boolean;
}

/** Rails to choose from; the chosen one has the blue edge and the tick. */
export function Choice<T extends string>(props: Props<T>) {
  const { name, legend, hint, error, options, value, onValue, long } = props;
  return (
    <fieldset className={error ? 'field faulty' : 'field'} aria-describedby={describedBy(name, hint, error)}>
      <legend className="mb-1 font-semibold">{legend}</legend>
      {hint && (
        <span className="hint" id={`${name}-hint`}>
          {hint}
        </span>
      )}
      {error && <Fault id={`${name}-fault`}>{error}</Fault>}
      <div className={long ? 'yn yn-long' : 'yn'}>
        {options.map((option, index) => (
          <label key={option.value}>
            <input
              type="radio"
              id={index === 0 ? name : undefined}
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onValue(option.value)}
            />
            <span>
              {option.label}
              {option.note && <small>{option.note}</small>}
            </span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
