import type { Flight } from '#domain/charts/flight';

/** The drawing on the front page: the invented Edda's first flight, up to its ninth tread. */
export const EXAMPLE_FLIGHT: Flight = {
  finding: 'Edda stands on the ninth tread; both test days behind her, a third to come on 5 Dec.',
  here: 9,
  hereWords: 'Edda, now',
  weeks: [
    { week: 1, title: 'The house and its stairs', load: 280, sessions: [100, 100, 80] },
    { week: 2, title: 'A push-up that fits you', load: 310, sessions: [100, 100, 100] },
    { week: 3, title: 'Sitting up, neck at rest', load: 340, sessions: [100, 100, 70] },
    { week: 4, title: 'First test day', load: 225, sessions: [100, 100, 100], landing: { day: '10 Oct' } },
    { week: 5, title: 'Feet on the stairs', load: 330, sessions: [100, 'missed', 90] },
    { week: 6, title: 'Slower on the way down', load: 365, sessions: [100, 100, 100] },
    { week: 7, title: 'When a week goes wrong', load: 340, sessions: [80, 'missed', 'missed'] },
    { week: 8, title: 'Second test day', load: 240, sessions: [100, 100, 90], landing: { day: '7 Nov' } },
    { week: 9, title: 'Hands one stair lower', load: 385, sessions: [100, 'to-come', 'to-come'] },
    { week: 10, title: 'Breath and pulse', load: 405, sessions: [] },
    { week: 11, title: 'Strength you can carry', load: 430, sessions: [] },
    { week: 12, title: 'Third test day', load: 260, sessions: [], landing: { day: '5 Dec' } },
  ],
};
