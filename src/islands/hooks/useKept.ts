import { useEffect, useRef, useState } from 'react';

interface Kept {
  key: string;
  values: Record<string, string>;
}

/**
 * Form values and their write key, kept on this device until the write is acknowledged: a reload shows what was typed,
 * and a second sending of the same form is recognised by its key.
 */
export function useKept(name: string, start: Record<string, string>) {
  const [values, setValues] = useState(start);
  const key = useRef('');
  useEffect(() => {
    try {
      const kept = JSON.parse(localStorage.getItem(name) ?? 'null') as Kept | null;
      if (kept) setValues((before) => ({ ...before, ...kept.values }));
      key.current = kept?.key ?? crypto.randomUUID();
    } catch {
      key.current = crypto.randomUUID();
    }
  }, [name]);
  return {
    values,
    get key() {
      return key.current;
    },
    set(field: string, value: string) {
      setValues((before) => {
        const after = { ...before, [field]: value };
        localStorage.setItem(name, JSON.stringify({ key: key.current, values: after } satisfies Kept));
        return after;
      });
    },
    drop: () => localStorage.removeItem(name),
  };
}
