import { beforeAll, describe, expect, it } from 'vitest';
import { addMember, addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();
/** What `$1` to `$5` stand for in every write below. */
let given: string[] = [];

beforeAll(async () => {
  const { app } = world;
  const coach = await addPerson(app, 'coach');
  const member = await addMember(app, { coach });
  const one = async (statement: string, values: unknown[]) => {
    const { rows } = await app.pool.query<{ id: string }>(statement, values);
    return rows[0]?.id ?? '';
  };
  const flight = await one(
    `insert into flights (member_id, number, starts_on, emphasis, created_at)
      values ($1, 1, '2026-11-02', 'balanced', now()) returning id`,
    [member.id],
  );
  const session = await one(
    `insert into training_sessions (member_id, flight_id, week, ordinal, title, planned_at)
      values ($1, $2, 1, 1, 'Push', now()) returning id`,
    [member.id, flight],
  );
  await one(
    `insert into session_items (session_id, position, movement, rung, sets, amount, unit, effort_asked, rule, why)
      values ($1, 1, 'push', 'push-up-floor', 3, 10, 'reps', 6, 'first', 'a reason') returning id`,
    [session],
  );
  await one(
    `insert into readiness_screens (member_id, answered_at, answers, result, reasons, valid_until)
      values ($1, now(), '{}', 'clear', '[]', '2027-11-10') returning id`,
    [member.id],
  );
  await one(
    `insert into check_ins (member_id, week_start, sent_at, words, went, sleep, soreness, effort)
      values ($1, '2026-11-02', now(), 'Words.', 4, 4, 2, 5) returning id`,
    [member.id],
  );
  await one(
    `insert into test_days (member_id, flight_id, week, taken_on, created_at)
      values ($1, $2, 0, '2026-11-02', now()) returning id`,
    [member.id, flight],
  );
  await one(`insert into practice (id, name) values (1, 'Newel') returning id`, []);
  given = [member.id, flight, session, coach.id, app.random.uuid()];
});

const mark = (columns: string, values: string) =>
  `insert into marks (member_id, test, taken_at, ${columns}) values ($1, 'push-ups', now(), ${values})`;
const session = (set: string) => `update training_sessions set ${set} where id = $3`;
const item = (set: string) => `update session_items set ${set} where session_id = $3`;
const house = (columns: string, values: string) =>
  `insert into houses (member_id, rail, updated_at, ${columns}) values ($1, 'none', now(), ${values})`;
const plan = (columns: string, values: string) =>
  `insert into plans (slug, name, summary, created_at, ${columns}) values ('illegal', 'n', 's', now(), ${values})`;
const checkIn = (set: string) => `update check_ins set ${set} where member_id = $1`;

/** What may never be written, and the constraint (or the database's own code) that refuses it. */
const ILLEGAL: readonly [constraint: string, write: string][] = [
  ['users_role_known', `update users set role = 'captain' where id = $1`],
  ['users_units_known', `update users set units = 'furlongs' where id = $1`],
  ['users_email_shape', `update users set email = 'nowhere' where id = $1`],
  ['users_email_shape', `update users set email = repeat('a', 250) || '@b.cd' where id = $1`],
  [
    'users_email_unique',
    `update users set email = (select upper(email) from users where id = $4) where id = $1`,
  ],
  ['members_sex_known', `update members set sex = 'other' where user_id = $1`],
  ['members_emphasis_known', `update members set emphasis = 'speed' where user_id = $1`],
  ['members_stature_plausible', `update members set stature_cm = 17 where user_id = $1`],
  ['members_coach_id_users_id_fk', `update members set coach_id = $5 where user_id = $1`],
  ['members_coach_id_users_id_fk', `delete from users where id = $4`],
  [
    'screens_result_known',
    `insert into readiness_screens (member_id, answered_at, answers, result, reasons, valid_until)
    values ($1, now(), '{}', 'maybe', '[]', '2027-01-01')`,
  ],
  ['P0001', `update readiness_screens set result = 'doctor' where member_id = $1`],
  [
    'holds_cause_known',
    `insert into holds (member_id, cause, reason, started_at) values ($1, 'mood', 'r', now())`,
  ],
  [
    'holds_period',
    `insert into holds (member_id, cause, reason, started_at, ended_at, clearance)
    values ($1, 'coach', 'r', now(), now() - interval '1 day', 'c')`,
  ],
  [
    'holds_cleared_whole',
    `insert into holds (member_id, cause, reason, started_at, ended_at)
    values ($1, 'coach', 'r', now() - interval '1 day', now())`,
  ],
  [
    'holds_no_overlap',
    `insert into holds (member_id, cause, reason, started_at)
    values ($1, 'coach', 'r', now()), ($1, 'coach', 'r', now() + interval '1 day')`,
  ],
  ['houses_stairs_plausible', house('stair_count, step_height_mm', '61, 170')],
  ['houses_stairs_plausible', house('stair_count, step_height_mm', '-3, 170')],
  ['houses_step_plausible', house('stair_count, step_height_mm', '13, 17')],
  [
    'houses_rail_known',
    `insert into houses (member_id, stair_count, step_height_mm, rail, updated_at)
    values ($1, 13, 170, 'rope', now())`,
  ],
  ['plans_interval_known', plan('"interval", amount_minor', `'week', 100`)],
  ['plans_amount_positive', plan('"interval", amount_minor', `'month', 0`)],
  ['plans_trial_bounds', plan('"interval", amount_minor, trial_days', `'month', 100, 61`)],
  ['plans_currency_shape', plan('"interval", amount_minor, currency', `'month', 100, 'GBP'`)],
  [
    'subscriptions_period',
    `update subscriptions set current_period_end = current_period_start - interval '1 s'
    where member_id = $1`,
  ],
  [
    'subscriptions_one_live',
    `insert into subscriptions (id, member_id, status, started_at, current_period_start,
    current_period_end, synced_at) values ('sub_two', $1, 'trialing', now(), now(), now(), now())`,
  ],
  [
    'invoices_paid_bounds',
    `insert into invoices (id, member_id, status, amount_minor, paid_minor, currency, issued_at)
    values ('in_1', $1, 'paid', 100, 101, 'gbp', now())`,
  ],
  [
    'flights_number',
    `insert into flights (member_id, number, starts_on, emphasis, created_at)
    values ($1, 1, '2026-11-02', 'balanced', now())`,
  ],
  ['flights_number_positive', `update flights set number = 0 where id = $2`],
  ['flights_emphasis_known', `update flights set emphasis = 'speed' where id = $2`],
  [
    'training_sessions_one_planned',
    `insert into training_sessions (member_id, flight_id, week, ordinal, title, planned_at)
    values ($1, $2, 1, 2, 'Again', now())`,
  ],
  ['training_sessions_week', session('week = 13')],
  ['training_sessions_ordinal', session('ordinal = 0')],
  ['training_sessions_effort', session('effort = 11')],
  ['training_sessions_minutes', session('minutes = 0')],
  ['training_sessions_pain', session(`pain = 'some'`)],
  ['session_items_sets', item('sets = 0')],
  ['session_items_amount', item('amount = 601')],
  ['session_items_unit', item(`unit = 'miles'`)],
  ['session_items_effort', item('effort_done = 0')],
  ['session_items_done', item('done_total = -1')],
  ['session_items_override_whole', item('overridden_by = $4')],
  [
    'session_items_position',
    `insert into session_items (session_id, position, movement, rung, sets, amount, unit,
    effort_asked, rule, why) values ($3, 1, 'squat', 'x', 1, 1, 'reps', 1, 'first', 'w')`,
  ],
  [
    'test_days_week',
    `insert into test_days (member_id, flight_id, week, taken_on, finished_at, created_at)
    values ($1, $2, 0, '2026-11-02', now(), now())`,
  ],
  ['test_days_week_known', `update test_days set week = 5 where member_id = $1`],
  [
    'test_days_one_open',
    `insert into test_days (member_id, flight_id, week, taken_on, created_at)
    values ($1, $2, 4, '2026-11-30', now())`,
  ],
  ['marks_value_plausible', mark('value', '-1')],
  ['marks_value_plausible', mark('value', `'NaN'`)],
  ['marks_value_plausible', mark('value', `'Infinity'`)],
  ['marks_effort', mark('value, effort', '20, 11')],
  ['marks_entry_known', mark('value, entry', `20, 'guess'`)],
  ['marks_pain_known', mark('value, pain', `20, 'some'`)],
  [
    'alerts_kind_known',
    `insert into alerts (member_id, kind, words, raised_at) values ($1, 'boredom', 'w', now())`,
  ],
  [
    'check_ins_week',
    `insert into check_ins (member_id, week_start, sent_at, words, went, sleep, soreness, effort)
    values ($1, '2026-11-02', now(), 'Again.', 4, 4, 2, 5)`,
  ],
  ['check_ins_scales', checkIn('sleep = 6')],
  ['check_ins_words', checkIn(`words = ''`)],
  ['check_ins_words', checkIn(`words = repeat('a', 4001)`)],
  ['check_ins_pain_known', checkIn(`pain = 'some'`)],
  [
    'messages_words',
    `insert into messages (member_id, by_coach, sent_at, words) values ($1, true, now(), '')`,
  ],
  [
    'photos_state_known',
    `insert into photos (member_id, object_key, state, bytes, created_at)
    values ($1, 'k', 'lost', 1, now())`,
  ],
  ['practice_single', `insert into practice (id, name) values (2, 'Another')`],
  ['23502', `update members set unsubscribe_token = null where user_id = $1`],
];

/** Runs one write that must fail, and names what refused it. */
async function refusalOf(write: string): Promise<string> {
  // Every parameter is named once with its type, so that a write may use only some of them.
  const used = [...new Set(write.match(/\$\d/g))];
  const values = used.map((name) => given[Number(name[1]) - 1]);
  const text = used
    .reduce((sql, name, index) => sql.replaceAll(name, `#${index + 1}::uuid`), write)
    .replaceAll('#', '$');
  const client = await world.app.pool.connect();
  try {
    await client.query('begin');
    await client.query(text, values);
    return 'nothing refused it';
  } catch (error) {
    const { constraint, code } = error as { constraint?: string; code?: string };
    return constraint ?? code ?? String(error);
  } finally {
    await client.query('rollback');
    client.release();
  }
}

describe('the database itself refuses', () => {
  it.each(
    ILLEGAL.map(
      ([constraint, write]) => [constraint, write.replace(/\s+/g, ' ').slice(0, 90), write] as const,
    ),
  )('%s: %s', async (constraint, _, write) => {
    expect(await refusalOf(write)).toBe(constraint);
  });

  it('by every check and exclusion that it has: none stands here untried', async () => {
    const { rows } = await world.app.pool.query<{ name: string }>(
      `select conname as name from pg_constraint c join pg_namespace n on n.oid = c.connamespace
        where n.nspname = 'public' and contype in ('c', 'x') order by 1`,
    );
    const tried = new Set(ILLEGAL.map(([constraint]) => constraint));
    expect(rows.map(({ name }) => name).filter((name) => !tried.has(name))).toEqual([]);
  });
});
