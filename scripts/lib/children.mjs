import { spawn } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { ROOT } from './root.mjs';
import { StepError } from './steps.mjs';

const STOP_MS = 12_000;

/** The processes one run has started; all of them end with it, however it ends. */
export class Children {
  #running = new Set();

  /**
   * Starts `node file` and waits until it says that it is ready (a line with `mark` on standard output).
   * `onExit` is called when it ends by itself; what it prints is added to `logFile`.
   */
  start(name, args, { env, mark, onExit, timeoutMs = 60_000, quiet = true, logFile, cwd = ROOT }) {
    const child = spawn(process.execPath, args, {
      cwd,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
    });
    this.#running.add(child);
    let said = '';
    const log = logFile ? createWriteStream(logFile, { flags: 'a' }) : null;
    return new Promise((done, fail) => {
      const give = (error) => {
        clearTimeout(timer);
        if (error) fail(error);
        else done(child);
      };
      const lastLines = () => said.split('\n').slice(-15).join('\n');
      const timer = setTimeout(
        () =>
          give(
            new StepError(
              `${name} did not get ready in ${timeoutMs / 1000} s.\n${lastLines()}`,
              'Start again; if it stays so, read its lines above.',
            ),
          ),
        timeoutMs,
      );
      const hear = (chunk) => {
        said = (said + chunk).slice(-20_000);
        log?.write(chunk);
        if (!quiet) process.stdout.write(chunk);
        if (mark && said.includes(mark)) give();
      };
      child.stdout.on('data', hear);
      child.stderr.on('data', hear);
      child.on('message', (message) => message === 'ready' && give());
      child.on('exit', (code) => {
        this.#running.delete(child);
        give(
          new StepError(
            `${name} ended with code ${code}.\n${lastLines()}`,
            'Read its lines above, mend it and start again.',
          ),
        );
        onExit?.(code);
      });
    });
  }

  /** Runs `node file` to its end. @throws StepError with its last lines when it fails */
  async run(name, args, env = {}) {
    const child = spawn(process.execPath, args, {
      cwd: ROOT,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    this.#running.add(child);
    let said = '';
    child.stdout.on('data', (chunk) => (said += chunk));
    child.stderr.on('data', (chunk) => (said += chunk));
    const code = await new Promise((done) => child.on('close', done));
    this.#running.delete(child);
    if (code !== 0)
      throw new StepError(
        `${name} failed.\n${said.split('\n').slice(-30).join('\n')}`,
        'Read its lines above, mend it and start again.',
      );
    return said;
  }

  /** Asks each to end, and ends those that do not. */
  async stop() {
    await Promise.all(
      [...this.#running].map(
        (child) =>
          new Promise((done) => {
            const hard = setTimeout(() => child.kill('SIGKILL'), STOP_MS);
            child.once('close', () => {
              clearTimeout(hard);
              done();
            });
            child.kill('SIGTERM');
          }),
      ),
    );
  }
}
