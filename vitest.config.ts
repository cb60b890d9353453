import { defineConfig } from 'vitest/config';

/** Plain Vite, without Astro: no test renders a page here (the browser stories do), and the set-up takes a second, not twenty. */
export default defineConfig({
  resolve: { alias: { 'astro:middleware': 'astro/virtual-modules/middleware.js' } },
  test: {
    reporters: ['default'],
    env: {
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    },
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['src/**/*.test.ts', 'fakes/**/*.test.ts', 'tests/unit/**/*.test.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          globalSetup: ['tests/support/template-database.ts'],
          testTimeout: 20_000,
          hookTimeout: 30_000,
        },
      },
    ],
  },
});
