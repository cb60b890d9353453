import { html, page, type Html } from '../../core/html.ts';

const BAND = 'Payment stand-in: no real money moves';

export const payPage = (title: string, body: Html, status = 200) => page({ title, band: BAND, body, status });

export const notFoundPage = () =>
  payPage(
    'Nothing here',
    html`<h1>Nothing here</h1>
      <p>This address leads nowhere. The link may be old.</p>
      <p><a href="/">To the start of the stand-in</a></p>`,
    404,
  );

/** What went wrong, at the top, with the focus-worthy role. */
export const faultBox = (message: string | null) =>
  message && html`<div class="fault" role="alert"><p>${message}</p></div>`;

/** 1796083200 → '1 Dec 2026'. */
export const day = (seconds: number | null | undefined) =>
  seconds
    ? new Date(seconds * 1000).toLocaleDateString('en-GB', {
        day: 'numeric',
        month: 'short',
        year: 'numeric',
        timeZone: 'UTC',
      })
    : 'never';

/** With the time of day, in UTC. */
export const moment = (seconds: number) =>
  `${day(seconds)}, ${new Date(seconds * 1000).toISOString().slice(11, 16)} UTC`;

/** A form's text fields. */
export async function readFields(request: Request): Promise<URLSearchParams> {
  return new URLSearchParams(await request.text());
}
