import { randomBytes } from 'node:crypto';
import { join } from 'node:path';

const secret = () => randomBytes(24).toString('base64url');

/** What a demo clone keeps to itself. */
export const makeSecrets = () => ({
  database: secret(),
  auth: secret() + secret(),
  webhook: `whsec_${secret()}`,
  store: secret(),
});

/** The environment of the product's processes and of the stand-ins, from ports, secrets and databases. */
export function environment({ ports, secrets, databaseUrl, fakesUrl, folder }) {
  const local = (port) => `http://127.0.0.1:${port}`;
  const product = {
    NODE_ENV: 'production',
    NEWEL_MODE: 'demo',
    PORT: String(ports.site),
    PUBLIC_ORIGIN: `http://localhost:${ports.site}`,
    DATABASE_URL: databaseUrl,
    AUTH_SECRET: secrets.auth,
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    STRIPE_SECRET_KEY: 'sk_test_demo',
    STRIPE_WEBHOOK_SECRET: secrets.webhook,
    STRIPE_API_URL: local(ports.payments),
    S3_ENDPOINT: local(ports.objects),
    S3_ACCESS_KEY: 'demo',
    S3_SECRET_KEY: secrets.store,
    INBOX_URL: local(ports.inbox),
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
  const fakes = {
    ...product,
    FAKES_DATABASE_URL: fakesUrl,
    FAKES_PAYMENTS_PORT: String(ports.payments),
    FAKES_SMTP_PORT: String(ports.smtp),
    FAKES_INBOX_PORT: String(ports.inbox),
    FAKES_OBJECTS_PORT: String(ports.objects),
    FAKES_OBJECTS_FOLDER: join(folder, 'objects'),
  };
  return { product, fakes };
}
