import { useEffect, useRef, useState } from 'react';

const SAVE_AFTER_MS = 800;

export type DraftBody = Record<string, string | number | null>;

/** Reads a copy kept on this device for when the line was down. */
function readLocal<T extends DraftBody>(place: string): T | null {
  try {
    return JSON.parse(localStorage.getItem(place) ?? 'null') as T | null;
  } catch {
    return null;
  }
}

/**
 * Form contents that outlive a reload and a lost line. They go to the server shortly after the last key press; until the
 * server has them, a copy stays on this device and is preferred at the next opening. A household may share the device: the
 * copy is the owner's alone.
 * @param owner id of who writes
 * @returns the values, a setter for one field, what to say about keeping them, and `drop` for after the sending
 */
export function useDraft<T extends DraftBody>(owner: string, key: string, start: T) {
  const place = `draft ${owner} ${key}`;
  const [values, setValues] = useState(start);
  const [kept, setKept] = useState('');
  const changed = useRef(false);

  useEffect(() => {
    const local = readLocal<T>(place);
    if (local) {
      setValues((before) => ({ ...before, ...local }));
      changed.current = true;
    }
  }, [place]);

  useEffect(() => {
    if (!changed.current) return;
    localStorage.setItem(place, JSON.stringify(values));
    // Words that were sent meanwhile are no draft any more.
    const timer = setTimeout(() => changed.current && void save(place, key, values, setKept), SAVE_AFTER_MS);
    const again = () => void save(place, key, values, setKept);
    window.addEventListener('online', again);
    return () => {
      clearTimeout(timer);
      window.removeEventListener('online', again);
    };
  }, [place, key, values]);

  return {
    values,
    kept,
    set: (name: keyof T & string, value: string | null) => {
      changed.current = true;
      setValues((before) => ({ ...before, [name]: value }));
    },
    drop: () => {
      changed.current = false;
      localStorage.removeItem(place);
    },
  };
}

async function save(
  place: string,
  key: string,
  body: DraftBody,
  say: (words: string) => void,
): Promise<void> {
  try {
    // A key is letters, digits, hyphens and one colon, which stands in a path as it is; `%3A` would be another spelling.
    const reply = await fetch(`/api/drafts/${key}`, {
      method: 'PUT',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ body }),
    });
    if (!reply.ok) throw new Error(String(reply.status));
    // What was typed while this was on its way stays on the device until it has gone up too.
    if (localStorage.getItem(`draft ${key}`) === JSON.stringify(body)) localStorage.removeItem(place);
    const time = new Date().toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });
    say(`Draft kept ${time}`);
  } catch {
    say('Kept on this device; it goes up when the line is back.');
  }
}
