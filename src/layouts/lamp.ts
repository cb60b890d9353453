/** The lamp switch: day or evening, kept on this device. Base has set the first state before anything was painted. */
const KEY = 'newel-lamp';
const root = document.documentElement;

function setLamp(state: 'on' | 'off'): void {
  root.dataset['lamp'] = state;
  for (const lamp of document.querySelectorAll('[data-lamp-switch]')) {
    lamp.setAttribute('aria-checked', String(state === 'on'));
  }
}

function keepLamp(state: 'on' | 'off'): void {
  try {
    localStorage.setItem(KEY, state);
  } catch {
    // A private window: the choice lasts as long as the page.
  }
}

setLamp(root.dataset['lamp'] === 'on' ? 'on' : 'off');
document.addEventListener('click', (event) => {
  if (!(event.target instanceof Element) || !event.target.closest('[data-lamp-switch]')) return;
  const next = root.dataset['lamp'] === 'on' ? 'off' : 'on';
  if (document.startViewTransition) document.startViewTransition(() => setLamp(next));
  else setLamp(next);
  keepLamp(next);
});
