import { z } from 'zod';

/** Values that the demo ships with; a production start with any of them is refused. */
const DEMO_SECRET = 'demo-only-not-a-secret';

const port = z.coerce.number().int().min(1).max(65_535);

const schema = z.object({
  /** `demo` allows demo sign-in, the moving clock and the stand-ins; `production` refuses all three. */
  NEWEL_MODE: z.enum(['demo', 'production']).default('demo'),
  PORT: port.default(4321),
  HOST: z.string().min(1).default('127.0.0.1'),
  PUBLIC_ORIGIN: z
    .url({ protocol: /^https?$/ })
    .transform((value) => new URL(value).origin)
    .optional(),
  TRUSTED_PROXIES: z.coerce.number().int().min(0).max(5).default(0),
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }).default('postgres://newel@127.0.0.1:5432/newel'),
  DATABASE_POOL: z.coerce.number().int().min(2).max(50).default(10),
  WORKER: z.enum(['inline', 'off']).default('inline'),
  AUTH_SECRET: z.string().min(16).default(DEMO_SECRET),
  SMTP_URL: z.url({ protocol: /^smtps?$/ }).default('smtp://127.0.0.1:4325'),
  MAIL_FROM: z.string().min(3).default('Newel <desk@newel.example>'),
  STRIPE_SECRET_KEY: z.string().min(8).default('sk_test_demo'),
  STRIPE_WEBHOOK_SECRET: z.string().min(8).default(`whsec_${DEMO_SECRET}`),
  /** Where the payment stand-in listens; unset means the real Stripe. */
  STRIPE_API_URL: z.url({ protocol: /^https?$/ }).optional(),
  S3_ENDPOINT: z.url({ protocol: /^https?$/ }).default('http://127.0.0.1:4327'),
  S3_REGION: z.string().min(1).default('local'),
  S3_BUCKET: z.string().min(3).default('newel'),
  S3_ACCESS_KEY: z.string().min(3).default('demo'),
  S3_SECRET_KEY: z.string().min(3).default(DEMO_SECRET),
  /** Shown on the demo's pages for developers. */
  INBOX_URL: z.url({ protocol: /^https?$/ }).optional(),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
});

/** The variables that are read; `.env.example` documents each. */
export const ENV_NAMES: readonly string[] = Object.keys(schema.shape);

export type Env = Readonly<ReturnType<typeof readEnv>>;

/** Thrown at start when the configuration cannot be used; lists every problem by name, never by value. */
export class EnvError extends Error {
  constructor(readonly problems: string[]) {
    super(`The configuration cannot be used:\n${problems.map((line) => `  - ${line}`).join('\n')}`);
    this.name = 'EnvError';
  }
}

/** What must not stand in a production start, each with the sentence that is shown. */
function productionProblems(env: z.infer<typeof schema>): string[] {
  const loopback = (url: string) => ['127.0.0.1', 'localhost', '[::1]'].includes(new URL(url).hostname);
  return [
    env.AUTH_SECRET.includes(DEMO_SECRET) && 'AUTH_SECRET is the demo secret',
    env.AUTH_SECRET.length < 32 && 'AUTH_SECRET is shorter than 32 characters',
    env.STRIPE_WEBHOOK_SECRET.includes(DEMO_SECRET) && 'STRIPE_WEBHOOK_SECRET is the demo secret',
    env.S3_SECRET_KEY.includes(DEMO_SECRET) && 'S3_SECRET_KEY is the demo secret',
    env.STRIPE_SECRET_KEY.includes('demo') && 'STRIPE_SECRET_KEY is the demo key',
    env.STRIPE_API_URL !== undefined && 'STRIPE_API_URL points at a stand-in',
    env.INBOX_URL !== undefined && 'INBOX_URL belongs to the demo',
    loopback(env.S3_ENDPOINT) && 'S3_ENDPOINT points at a stand-in on this machine',
    loopback(env.SMTP_URL) && 'SMTP_URL points at a stand-in on this machine',
    env.PUBLIC_ORIGIN === undefined && 'PUBLIC_ORIGIN is missing',
    env.PUBLIC_ORIGIN?.startsWith('http:') && 'PUBLIC_ORIGIN must be https',
  ].filter((problem) => typeof problem === 'string');
}

/**
 * Reads and checks the whole environment once, at start.
 * @throws EnvError naming every variable that is wrong and, in production, every demo value left in place.
 */
export function readEnv(source: Record<string, string | undefined> = process.env) {
  const known = Object.fromEntries(ENV_NAMES.flatMap((name) => (source[name] ? [[name, source[name]]] : [])));
  const parsed = schema.safeParse(known);
  if (!parsed.success) {
    throw new EnvError(parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`));
  }
  const env = parsed.data;
  const problems = env.NEWEL_MODE === 'production' ? productionProblems(env) : [];
  if (problems.length > 0) throw new EnvError(problems);
  const publicOrigin = env.PUBLIC_ORIGIN ?? `http://localhost:${env.PORT}`;
  return {
    demo: env.NEWEL_MODE === 'demo',
    port: env.PORT,
    host: env.HOST,
    publicOrigin,
    secure: publicOrigin.startsWith('https:'),
    trustedProxies: env.TRUSTED_PROXIES,
    databaseUrl: env.DATABASE_URL,
    databasePool: env.DATABASE_POOL,
    inlineWorker: env.WORKER === 'inline',
    authSecret: env.AUTH_SECRET,
    smtpUrl: env.SMTP_URL,
    mailFrom: env.MAIL_FROM,
    stripeSecretKey: env.STRIPE_SECRET_KEY,
    stripeWebhookSecret: env.STRIPE_WEBHOOK_SECRET,
    stripeApiUrl: env.STRIPE_API_URL,
    s3: {
      endpoint: env.S3_ENDPOINT,
      region: env.S3_REGION,
      bucket: env.S3_BUCKET,
      accessKey: env.S3_ACCESS_KEY,
      secretKey: env.S3_SECRET_KEY,
    },
    inboxUrl: env.INBOX_URL,
    logLevel: env.LOG_LEVEL,
  };
}
