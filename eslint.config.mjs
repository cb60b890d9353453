import astro from 'eslint-plugin-astro';
import tseslint from 'typescript-eslint';

/** Which layers a layer may never import, by alias and by relative path: left may import right, never back. */
const NEVER = {
  domain: ['contracts', 'server', 'islands', 'components', 'layouts', 'pages'],
  contracts: ['server', 'islands', 'components', 'layouts', 'pages'],
  islands: ['server', 'components', 'layouts', 'pages'],
  server: ['islands', 'components', 'layouts', 'pages'],
};

const layerRule = (layers) => [
  'error',
  {
    patterns: [
      {
        group: [
          ...layers.flatMap((layer) => [`#${layer}/*`, `**/${layer}/**`]),
          '#fakes/*',
          '#support/*',
          '**/fakes/**',
          '**/tests/**',
        ],
        message: 'Imports go one way: pages → server → contracts → domain. See DEVELOPERS.md.',
        allowTypeImports: false,
      },
    ],
  },
];

const restricted = (...rules) => ['error', ...rules];
const ENVIRONMENT = {
  selector: "MemberExpression[object.name='process'][property.name='env']",
  message: 'Only src/server/env.ts reads the environment.',
};
const ORIGIN = {
  selector: "MemberExpression[object.property.name='url'][property.name='origin']",
  message: 'Astro.url.origin is never the public origin; use app.env.publicOrigin or a relative path.',
};

export default tseslint.config(
  { ignores: ['dist/', 'node_modules/', '.astro/', '.newel/', '.newel-test/', 'test-results/', 'drizzle/'] },
  ...tseslint.configs.recommended,
  ...astro.configs['flat/recommended'],
  {
    rules: {
      'max-lines': ['error', { max: 300, skipBlankLines: true, skipComments: true }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'astro/no-set-html-directive': 'error',
      'astro/no-unused-define-vars-in-style': 'error',
      'no-restricted-syntax': restricted(ORIGIN, {
        selector: "JSXAttribute[name.name='define:vars']",
        message: 'define:vars changes by request and is blocked by the CSP.',
      }),
    },
  },
  {
    files: ['src/**/*.{ts,tsx,astro}'],
    rules: { 'no-console': 'error', 'no-restricted-syntax': restricted(ORIGIN, ENVIRONMENT) },
  },
  { files: ['src/server/env.ts', 'src/**/*.test.ts'], rules: { 'no-restricted-syntax': restricted(ORIGIN) } },
  { files: ['src/server/{setup,main}.ts'], rules: { 'no-console': 'off' } },
  // These place drawings of our own pure functions, in which every text is escaped.
  {
    files: [
      'src/components/charts/**',
      'src/components/figure/**',
      'src/components/lesson/**',
      'src/components/home/**',
      'src/components/{Logo,Glyph,Gate}.astro',
      'src/layouts/**',
    ],
    rules: { 'astro/no-set-html-directive': 'off' },
  },
  ...Object.entries(NEVER).map(([layer, layers]) => ({
    files: [`src/${layer}/**`],
    ignores: ['**/*.test.ts'],
    rules: { '@typescript-eslint/no-restricted-imports': layerRule(layers) },
  })),
  {
    files: ['src/{pages,components,layouts}/**', 'src/middleware.ts'],
    rules: { '@typescript-eslint/no-restricted-imports': layerRule([]) },
  },
  { files: ['scripts/**/*.mjs', '*.config.mjs'], rules: { 'no-undef': 'off' } },
);
