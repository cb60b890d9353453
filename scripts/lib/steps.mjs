/** A failed step: what went wrong, and what to do about it. */
export class StepError extends Error {
  constructor(what, todo) {
    super(what);
    this.name = 'StepError';
    this.todo = todo;
  }
}

/** Runs one step and prints it as a line with a mark and its seconds. A step may return a few words to add. */
export async function step(name, work) {
  const began = performance.now();
  const line = (mark, extra = '') =>
    console.log(
      `${mark} ${name.padEnd(34)} ${((performance.now() - began) / 1000).toFixed(1).padStart(5)} s${extra ? `  ${extra}` : ''}`,
    );
  try {
    const said = await work();
    line('✓', typeof said === 'string' ? said : '');
    return said;
  } catch (error) {
    line('✗');
    throw error;
  }
}

/** Says what went wrong and what to do, in that order. */
export function explain(error) {
  console.error(`\n${error.message}`);
  if (error.todo) console.error(`What to do: ${error.todo}`);
  else if (error.stack) console.error(error.stack.split('\n').slice(1, 6).join('\n'));
}
