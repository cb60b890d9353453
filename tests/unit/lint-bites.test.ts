import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

const eslint = new ESLint();

/** The rules that a text breaks when it stands at this place. */
async function broken(filePath: string, text: string): Promise<(string | null)[]> {
  const [result] = await eslint.lintText(text, { filePath });
  return (result?.messages ?? []).map(({ ruleId }) => ruleId);
}

const IMPORTS = '@typescript-eslint/no-restricted-imports';
const take = (from: string) => `import { thing } from '${from}';\nexport const it = thing;\n`;
const astro = (frontmatter: string, body = '<p>Hello</p>') => `---\n${frontmatter}\n---\n\n${body}\n`;
const used = (from: string) => astro(`import { thing } from '${from}';`, '<p>{thing}</p>');

describe('imports go one way', () => {
  it.each([
    ['src/domain/load/x.ts', '#contracts/marks'],
    ['src/domain/load/x.ts', '#server/app'],
    ['src/domain/load/x.ts', '../../server/app.ts'],
    ['src/domain/load/x.ts', '#islands/ui/Choice'],
    ['src/contracts/x.ts', '#server/app'],
    ['src/contracts/x.ts', '../server/app.ts'],
    ['src/islands/X.tsx', '#server/app'],
    ['src/islands/ui/X.tsx', '../../server/services/marks.ts'],
    ['src/islands/X.tsx', '#components/Tread'],
    ['src/server/services/x.ts', '#components/Tread'],
    ['src/server/services/x.ts', '../../islands/ui/Choice.tsx'],
    ['src/server/services/x.ts', '#fakes/payments/index'],
    ['src/server/services/x.ts', '../../../fakes/payments/index.ts'],
    ['src/server/services/x.ts', '#support/people'],
    ['src/server/services/x.ts', '../../../tests/support/people.ts'],
    ['src/pages/api/x.ts', '#fakes/payments/index'],
    ['src/middleware.ts', '#support/people'],
  ])('%s may not take %s', async (place, from) => {
    expect(await broken(place, take(from))).toContain(IMPORTS);
  });

  it.each([
    ['src/components/X.astro', '#server/services/marks'],
    ['src/components/desk/X.astro', '../../server/services/marks.ts'],
    ['src/layouts/X.astro', '#server/app'],
    ['src/pages/x.astro', '../../tests/support/people.ts'],
  ])('%s may not take %s', async (place, from) => {
    expect(await broken(place, used(from))).toContain(IMPORTS);
  });

  it.each([
    ['src/server/services/x.ts', '#domain/load/limits'],
    ['src/contracts/x.ts', '#domain/numbers/parse'],
    ['src/islands/X.tsx', '#contracts/client'],
    ['src/pages/api/x.ts', '#server/app'],
    ['fakes/payments/x.ts', '#contracts/errors'],
    ['src/server/services/x.ts', './viewer.ts'],
  ])('%s may take %s', async (place, from) => {
    expect(await broken(place, take(from))).toEqual([]);
  });

  it('lets a component name a type of the server', async () => {
    const text = astro(
      "import type { Thing } from '#server/services/marks';\ninterface Props { thing: Thing }\nconst { thing } = Astro.props;",
      '<p>{thing}</p>',
    );
    expect(await broken('src/components/X.astro', text)).toEqual([]);
  });
});

describe('what is never written', () => {
  it.each([
    ['any', 'src/domain/x.ts', 'export const x = (y: any) => y;', '@typescript-eslint/no-explicit-any'],
    [
      'a silenced type',
      'src/domain/x.ts',
      '// @ts-ignore\nexport const x = 1;',
      '@typescript-eslint/ban-ts-comment',
    ],
    [
      'a file past 300 lines',
      'src/domain/x.ts',
      'export const x = [\n' + '  1,\n'.repeat(300) + '];\n',
      'max-lines',
    ],
    ['the environment', 'src/server/x.ts', "export const x = process.env['PORT'];", 'no-restricted-syntax'],
    [
      'the environment, in a stand-in',
      'fakes/mail/x.ts',
      'export const x = process.env;',
      'no-restricted-syntax',
    ],
    ['the console', 'src/server/x.ts', "console.log('here');", 'no-console'],
    ['an unused value', 'src/domain/x.ts', 'const x = 1;', '@typescript-eslint/no-unused-vars'],
    [
      'the origin of a request',
      'src/pages/x.astro',
      astro('const here = Astro.url.origin;', '<p>{here}</p>'),
      'no-restricted-syntax',
    ],
    [
      'the origin of a request, in an endpoint',
      'src/pages/x.ts',
      'export const GET = (c: { url: URL }) => new Response(c.url.origin);',
      'no-restricted-syntax',
    ],
    [
      'define:vars in a script',
      'src/pages/x.astro',
      astro('const a = 1;', '<script define:vars={{ a }}></script>'),
      'no-restricted-syntax',
    ],
    [
      'define:vars in a style',
      'src/components/charts/X.astro',
      astro('const a = 1;', '<style define:vars={{ a }}></style>'),
      'no-restricted-syntax',
    ],
    [
      'raw HTML',
      'src/pages/x.astro',
      astro("const a = '';", '<p set:html={a} />'),
      'astro/no-set-html-directive',
    ],
    [
      'raw HTML in a layout',
      'src/layouts/X.astro',
      astro("const a = '';", '<p set:html={a} />'),
      'astro/no-set-html-directive',
    ],
  ])('%s', async (_name, place, text, rule) => {
    expect(await broken(place, text)).toContain(rule);
  });

  it.each([
    ['the environment in its one module', 'src/server/env.ts', "export const x = process.env['PORT'];"],
    ['a drawing in a chart', 'src/components/charts/X.astro', astro("const a = '';", '<p set:html={a} />')],
    ['300 lines', 'src/domain/x.ts', 'export const x = [\n' + '  1,\n'.repeat(298) + '];\n\n// a note\n'],
  ])('but %s may stand', async (_name, place, text) => {
    expect(await broken(place, text)).toEqual([]);
  });
});
