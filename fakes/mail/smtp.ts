import { SMTPServer } from 'smtp-server';
import type { DocStore } from '../core/doc-store.ts';
import { keepLetter } from './letters.ts';

interface SmtpParts {
  store: DocStore;
  port: number;
  now: () => Date;
  id: () => string;
}

interface Smtp {
  port: number;
  close(): Promise<void>;
}

async function readAll(stream: AsyncIterable<unknown>): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of stream) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

/** A mail server on loopback that takes every mail, from anybody, and sends none on. Any name and password will do. */
export async function serveSmtp({ store, port, now, id }: SmtpParts): Promise<Smtp> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    onAuth: (_auth, _session, done) => done(null, { user: 'anybody' }),
    onData: (stream, session, done) => {
      const recipients = session.envelope.rcptTo.map(({ address }) => address);
      readAll(stream)
        .then((raw) => keepLetter(store, { id: id(), at: now(), raw, recipients }))
        .then(
          () => done(),
          (error: Error) => done(error),
        );
    },
  });
  // A client that hangs up in the middle is its own affair.
  server.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const address = server.server.address();
  if (address === null || typeof address === 'string') throw new Error('the mail server has no port');
  return { port: address.port, close: () => new Promise((resolve) => server.close(resolve)) };
}
