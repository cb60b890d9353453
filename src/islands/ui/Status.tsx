import type { ReactNode } from 'react';

/** A line that is read out when it changes: `Draft kept 15:38`. Always in the page, so that it is heard. */
export function Status({ children }: { children?: ReactNode }) {
  return (
    <p className="soft text-15" role="status">
      {children}
    </p>
  );
}
