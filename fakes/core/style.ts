import { route } from './router.ts';

/** The stand-ins' own small sheet: the hall's colours, no fonts to fetch. A string, so that one bundled file holds all. */
const SHEET = `
:root {
  color-scheme: light dark;
  --wall: light-dark(oklch(.905 .028 160), oklch(.305 .026 118));
  --wood: light-dark(oklch(.987 .005 110), oklch(.365 .024 98));
  --wood-2: light-dark(oklch(.955 .008 120), oklch(.335 .024 100));
  --paper: light-dark(oklch(.975 .013 92), oklch(.375 .028 88));
  --dado: light-dark(oklch(.375 .047 168), oklch(.235 .026 150));
  --on-dado: light-dark(oklch(.95 .02 155), oklch(.93 .03 95));
  --ink: light-dark(oklch(.23 .022 165), oklch(.955 .022 92));
  --ink-2: light-dark(oklch(.4 .028 165), oklch(.83 .03 95));
  --rail: light-dark(oklch(.39 .075 48), oklch(.455 .08 49));
  --rail-hi: light-dark(oklch(.52 .09 52), oklch(.6 .09 54));
  --rail-lo: light-dark(oklch(.3 .06 45), oklch(.34 .065 47));
  --on-rail: oklch(.983 .013 90);
  --brass: light-dark(oklch(.6 .1 80), oklch(.8 .12 86));
  --blue: light-dark(oklch(.375 .15 265), oklch(.885 .06 240));
  --nosing: oklch(.87 .165 95);
  --line: light-dark(oklch(.565 .03 165), oklch(.66 .03 110));
  --hair: light-dark(oklch(.8 .02 160), oklch(.46 .024 100));
  --shade: light-dark(oklch(.3 .03 165 / .2), oklch(.1 .02 110 / .5));
}
*, ::before, ::after { box-sizing: border-box }
html { background: var(--wall); color: var(--ink); font: 400 100%/1.55 system-ui, sans-serif }
body { margin: 0; font-size: 1.0625rem }
header { background: var(--dado); color: var(--on-dado); border-bottom: 3px solid var(--brass); padding: .75rem 1.25rem }
header p { margin: 0 auto; max-width: 57.5rem; font-size: .9375rem }
main { max-width: 60rem; margin: 0 auto; padding: 2rem 1.25rem 4rem }
main:focus { outline: none }
main.narrow, .narrow { max-width: 38rem }
.skip { position: absolute; left: -99rem }
.skip:focus { left: .5rem; top: .5rem; background: var(--wood); padding: .5rem 1rem; z-index: 1 }
h1, h2, h3 { font-family: 'Bookman Old Style', Georgia, serif; font-weight: 500; line-height: 1.15; text-wrap: balance }
h1 { font-size: clamp(1.75rem, 1.3rem + 2vw, 2.375rem); margin: 0 0 1rem }
h2 { font-size: 1.375rem; margin: 2.5rem 0 .75rem }
p { max-width: 62ch; margin: .5rem 0; text-wrap: pretty }
a { color: inherit; text-underline-offset: .2em }
:focus-visible { outline: 3px solid var(--ink); outline-offset: 3px }
.panel { background: var(--wood); border: 1px solid var(--hair); border-radius: 2px; padding: 1.25rem; margin: 1.25rem 0; box-shadow: 0 .5rem 1rem -.6rem var(--shade) }
.panel > :first-child { margin-top: 0 }
.quiet { color: var(--ink-2); font-size: .9375rem }
.fault { border-left: 6px solid var(--nosing); background: var(--wood); padding: .75rem 1rem; margin: 1.25rem 0; outline: 1px solid var(--ink) }
.said { border-left: 6px solid var(--brass); background: var(--wood); padding: .75rem 1rem; margin: 1.25rem 0 }
.due { font-size: 1.375rem; font-variant-numeric: tabular-nums lining-nums }
.scroll { overflow-x: auto }
table { border-collapse: collapse; width: 100%; font-variant-numeric: tabular-nums lining-nums; font-size: .9375rem }
th { text-align: left; font-size: .8125rem; font-weight: 600; color: var(--ink-2); border-bottom: 2px solid var(--line); padding: .375rem .75rem .375rem 0; white-space: nowrap }
td { border-bottom: 1px solid var(--hair); padding: .5rem .75rem .5rem 0; vertical-align: top; overflow-wrap: break-word }
td form { margin-top: .5rem }
th[scope=row] { border-bottom: 1px solid var(--hair); padding-block: .5rem }
.figure { text-align: right; padding-right: 0; white-space: nowrap }
code, pre { font: .875rem/1.45 ui-monospace, monospace; overflow-wrap: anywhere; white-space: pre-wrap }
fieldset { border: 0; padding: 0; margin: 1.25rem 0 }
legend { font-weight: 600; padding: 0; margin-bottom: .5rem }
.choice { display: flex; gap: .75rem; align-items: center; min-height: 3rem; padding: .5rem .875rem; margin: .375rem 0; border: 1px solid var(--line); border-radius: 2px; background: var(--wood); cursor: pointer }
.choice:has(:checked) { border-color: var(--blue); box-shadow: inset 0 0 0 2px var(--blue) }
.choice input { width: 1.25rem; height: 1.25rem; flex: none; accent-color: var(--blue) }
.choice small { display: block; color: var(--ink-2); font-size: .9375rem; font-variant-numeric: tabular-nums }
label.field { display: block; font-weight: 600; margin-top: 1.25rem }
.field small { display: block; font-weight: 400; color: var(--ink-2); font-size: .9375rem }
input[type=text], input[type=email], input[type=search] { display: block; width: 100%; max-width: 24rem; min-height: 3rem; margin-top: .375rem; padding: .5rem .75rem; font: inherit; color: inherit; background: var(--wood-2); border: 1px solid var(--line); border-bottom-width: 3px; border-radius: 2px }
.acts { display: flex; flex-wrap: wrap; gap: .875rem; align-items: center; margin-top: 1.5rem }
button, .button { font: inherit; cursor: pointer; min-height: 3rem; padding: .5rem 1.25rem; border-radius: 2rem; border: 1px solid var(--line); background: var(--wood); color: var(--ink); text-decoration: none; display: inline-flex; align-items: center }
button.tread { border: 0; border-radius: 2px; border-top: 6px solid var(--rail-hi); background: var(--rail); color: var(--on-rail); min-height: 3.25rem; font-weight: 600; box-shadow: 0 2px 0 var(--rail-lo) }
button.tread:active { translate: 0 2px; box-shadow: none }
dl { display: grid; grid-template-columns: max-content 1fr; gap: .375rem 1.25rem; margin: 0 }
dt { color: var(--ink-2) }
dd { margin: 0; overflow-wrap: anywhere }
iframe { width: 100%; height: 38rem; border: 1px solid var(--line); background: var(--wood) }
details { margin: 1rem 0 }
summary { cursor: pointer; min-height: 2rem }
@media (max-width: 30rem) {
  dl { grid-template-columns: 1fr; gap: 0 }
  dd { margin-bottom: .5rem }
  .acts > *, .acts button { width: 100%; justify-content: center }
}
@media print {
  :root { color-scheme: light }
  html, body { background: none }
  header, .acts, .skip { display: none }
  .panel { border: 0; box-shadow: none; padding: 0 }
}
@media (forced-colors: active) { .fault, .said, .choice:has(:checked) { border: 2px solid Highlight } }
`;

/** The address that `page` links to. */
export const styleRoute = route(
  'GET',
  '/_fake/style.css',
  async () => new Response(SHEET, { headers: { 'content-type': 'text/css; charset=utf-8' } }),
);
