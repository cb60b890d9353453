/** Pencil marks draw once, when first seen; and what is folded is opened for the printer. */
const drawings = [...document.querySelectorAll('svg')].filter((svg) => svg.querySelector('.draw, .fade'));

if ('IntersectionObserver' in window) {
  const seen = new IntersectionObserver(
    (entries) => {
      for (const entry of entries) {
        if (!entry.isIntersecting) continue;
        entry.target.classList.remove('waits');
        seen.unobserve(entry.target);
      }
    },
    { threshold: 0.25 },
  );
  for (const svg of drawings) {
    svg.classList.add('waits');
    seen.observe(svg);
  }
}

addEventListener('beforeprint', () => {
  for (const folded of document.querySelectorAll<HTMLDetailsElement>('details.opens')) folded.open = true;
  for (const svg of drawings) svg.classList.remove('waits');
});
