import type { ButtonHTMLAttributes } from 'react';

/** The second action. */
export function RailButton({ className = '', ...rest }: ButtonHTMLAttributes<HTMLButtonElement>) {
  return <button type="button" {...rest} className={`railbtn ${className}`} />;
}
