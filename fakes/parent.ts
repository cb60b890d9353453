import { fstatSync } from 'node:fs';

/** Whether somebody holds the other end of our standard input; a terminal or an empty device has nobody there. */
function hasFeeder(): boolean {
  try {
    const input = fstatSync(0);
    return input.isFIFO() || input.isSocket();
  } catch {
    // Standard input was closed before we began.
    return false;
  }
}

/** Calls `gone` once when the process that started this one is no longer there: its channel or its pipe closes. */
export function whenParentDies(gone: () => void): void {
  if (process.connected) process.once('disconnect', gone);
  if (!hasFeeder()) return;
  process.stdin.once('end', gone);
  process.stdin.once('close', gone);
  process.stdin.resume();
}
