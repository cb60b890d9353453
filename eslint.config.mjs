import astro from 'eslint-plugin-astro';
import tseslint from 'typescript-eslint';

const ONE_WAY = 'Imports go one way: pages → server → contracts → domain. See DEVELOPERS.md.';

/** Which layers a layer may never import, by alias and by relative path: left may import right, never back. */
const NEVER = {
  domain: ['contracts', 'server', 'islands', 'components', 'layouts', 'pages'],
  contracts: ['server', 'islands', 'components', 'layouts', 'pages'],
  islands: ['server', 'components', 'layouts', 'pages'],
  server: ['islands', 'components', 'layouts', 'pages'],
  components: ['server', 'pages'],
  layouts: ['server', 'pages'],
  pages: [],
};
/** A pattern is read as in .gitignore, where a bare # begins a comment. */
const alias = (name) => `\\#${name}/**`;
/** Nothing that runs for people imports a stand-in or a test. */
const OUTSIDE = [alias('fakes'), alias('support'), '**/fakes/**', '**/tests/**'];
/** A component may name the shape of what it is given; a type is gone before anything runs. */
const NAMES_TYPES = ['components', 'layouts'];

const layerRule = (layer) => [
  'error',
  {
    patterns: [
      { group: OUTSIDE, message: ONE_WAY },
      ...NEVER[layer].map((other) => ({
        group: [alias(other), `**/${other}/**`],
        message: ONE_WAY,
        allowTypeImports: NAMES_TYPES.includes(layer) && other === 'server',
      })),
    ],
  },
];

const ENVIRONMENT = {
  selector: "MemberExpression[object.name='process'][property.name='env']",
  message: 'Only src/server/env.ts reads the environment.',
};
const ORIGIN = {
  selector: "MemberExpression[object.property.name='url'][property.name='origin']",
  message: 'Astro.url.origin is never the public origin; use app.env.publicOrigin or a relative path.',
};
const DEFINE_VARS = {
  selector: "JSXNamespacedName[namespace.name='define'][name.name='vars']",
  message: 'define:vars writes unescaped text into the page (CVE-2026-41067) and is blocked by the CSP.',
};
const banned = (...rules) => ({ 'no-restricted-syntax': ['error', ORIGIN, DEFINE_VARS, ...rules] });

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
      ...banned(),
    },
  },
  { files: ['src/**'], rules: { 'no-console': 'error', ...banned(ENVIRONMENT) } },
  { files: ['fakes/**'], ignores: ['fakes/main.ts'], rules: banned(ENVIRONMENT) },
  { files: ['src/server/env.ts'], rules: banned() },
  { files: ['src/server/{setup,main}.ts'], rules: { 'no-console': 'off' } },
  // The people of the demo practice: one list of data.
  { files: ['src/server/demo/cast.ts'], rules: { 'max-lines': 'off' } },
  // These place drawings of our own pure functions, in which every text is escaped, and JSON with every < escaped.
  {
    files: [
      'src/components/{charts,figure,lesson,home}/**',
      'src/components/{Logo,Gate}.astro',
      'src/pages/lessons/*.astro',
    ],
    rules: { 'astro/no-set-html-directive': 'off' },
  },
  ...Object.keys(NEVER).map((layer) => ({
    files: [`src/${layer}/**`],
    ignores: ['**/*.test.ts'],
    rules: { '@typescript-eslint/no-restricted-imports': layerRule(layer) },
  })),
  { files: ['src/middleware.ts'], rules: { '@typescript-eslint/no-restricted-imports': layerRule('pages') } },
);
