import type { InputHTMLAttributes, ReactNode, TextareaHTMLAttributes } from 'react';
import { describedBy, Fault } from './Fault.tsx';

interface Shared {
  name: string;
  label: ReactNode;
  hint?: string | undefined;
  error?: string | undefined;
  value: string;
  onValue: (value: string) => void;
}

type Props = Shared &
  (
    | ({ rows: number } & Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, keyof Shared | 'rows'>)
    | ({ rows?: undefined } & Omit<InputHTMLAttributes<HTMLInputElement>, keyof Shared>)
  );

/** A box with its label, hint and fault; `rows` makes it a box of several lines. */
export function TextField({ name, label, hint, error, value, onValue, ...rest }: Props) {
  const id = rest.id ?? name;
  const shared = {
    id,
    name,
    value,
    className: 'box',
    'aria-describedby': describedBy(id, hint, error),
    'aria-invalid': error ? true : undefined,
  };
  return (
    <div className={error ? 'field faulty' : 'field'}>
      <label htmlFor={id}>{label}</label>
      {hint && (
        <span className="hint" id={`${id}-hint`}>
          {hint}
        </span>
      )}
      {error && <Fault id={`${id}-fault`}>{error}</Fault>}
      {rest.rows === undefined ? (
        <input {...rest} {...shared} onChange={(event) => onValue(event.target.value)} />
      ) : (
        <textarea {...rest} {...shared} onChange={(event) => onValue(event.target.value)} />
      )}
    </div>
  );
}
