import type { ButtonHTMLAttributes } from 'react';

type Props = ButtonHTMLAttributes<HTMLButtonElement> & {
  /** The work is under way: the words say so and a second press does nothing. */
  busy?: boolean | undefined;
  busyWords?: string;
};

/** The one main action of an island. Stays focusable while busy, so that the focus is not lost. */
export function Tread({ busy, busyWords = 'One moment', className = '', children, onClick, ...rest }: Props) {
  return (
    <button
      type="submit"
      {...rest}
      className={`tread ${className}`}
      aria-disabled={busy || undefined}
      onClick={(event) => (busy ? event.preventDefault() : onClick?.(event))}
    >
      {busy ? busyWords : children}
    </button>
  );
}
