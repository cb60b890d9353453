import mdx from '@astrojs/mdx';
import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig, fontProviders } from 'astro/config';

/** One local font face; Astro hashes the file, preloads it and computes a fallback of the same width. */
const face = (name, file, weight, fallbacks) => ({
  name,
  cssVariable: `--font-${file.role}-face`,
  provider: fontProviders.local(),
  options: { variants: [{ weight, style: 'normal', src: [`./src/assets/fonts/${file.name}.woff2`] }] },
  fallbacks,
});

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'middleware' }),
  trailingSlash: 'never',
  build: { format: 'file', inlineStylesheets: 'never' },
  devToolbar: { enabled: false },
  // Our front server checks the origin, then hands every request on as `localhost`, so a build serves any public origin.
  security: { checkOrigin: true, allowedDomains: [{ hostname: 'localhost' }] },
  integrations: [react(), mdx()],
  vite: {
    plugins: [tailwindcss()],
    build: { assetsInlineLimit: 0 },
    // The clusters' own files change all the time and are nobody's source; watching them runs out of file handles.
    server: { watch: { ignored: ['**/.newel*/**'] } },
  },
  experimental: {
    fonts: [
      face('Besley', { role: 'display', name: 'besley' }, '400 700', ['Georgia', 'serif']),
      face('Instrument Sans', { role: 'text', name: 'instrument-sans' }, '400 700', [
        'system-ui',
        'sans-serif',
      ]),
      face('Patrick Hand', { role: 'hand', name: 'patrick-hand' }, '400', ['cursive']),
    ],
  },
});
