import { useEffect, useRef } from 'react';

/** Counts the faults, links each to its field, and takes the focus whenever a new set of them arrives. */
export function ErrorSummary({ errors }: { errors: Record<string, string> }) {
  const box = useRef<HTMLDivElement>(null);
  const faults = Object.entries(errors);
  useEffect(() => {
    if (Object.keys(errors).length > 0) box.current?.focus();
  }, [errors]);
  if (faults.length === 0) return null;
  return (
    <div className="summary mb-6" role="alert" tabIndex={-1} ref={box}>
      <h2 className="text-20">
        There is a problem{faults.length > 1 && `: ${faults.length} answers need a look`}
      </h2>
      <p className="text-15">Everything you typed is still here.</p>
      <ul>
        {faults.map(([name, sentence]) => (
          <li key={name}>{name === 'form' ? sentence : <a href={`#${name}`}>{sentence}</a>}</li>
        ))}
      </ul>
    </div>
  );
}
