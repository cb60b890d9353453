import pg from 'pg';

/** Ids of generated people: their number in the last digits, so that every table is filled by one statement. */
const MEMBER = `('00000000-0000-4000-8000-' || lpad(to_hex(n), 12, '0'))::uuid`;
const COACH = (number) => `('00000000-0000-4000-9000-' || lpad(to_hex(${number}), 12, '0'))::uuid`;
export const CROWDED_COACH = '00000000-0000-4000-9000-000000000000';
const CROWD = 1000;
const CASELOAD = 40;

/** From the member's day in the flight: 1 to 80. */
const DAY = '(1 + n % 80)';

const STATEMENTS = [
  `insert into users (id, name, email, role, created_at)
    select ${COACH('c')}, 'Coach ' || c, 'coach' || c || '@bench.example', 'coach', now()
    from generate_series(0, (select max(n) / ${CASELOAD} from many)) c`,
  `insert into users (id, name, email, role, created_at)
    select ${MEMBER}, 'Member ' || n, 'member' || n || '@bench.example', 'member', now() - interval '90 days' from many`,
  `insert into members (user_id, coach_id, joined_at, birth_date, sex)
    select ${MEMBER}, ${COACH(`case when n <= ${CROWD} then 0 else n / ${CASELOAD} end`)}, now() - interval '85 days',
      date '1970-01-01' + n, case when n % 2 = 0 then 'female' else 'male' end from many`,
  `insert into houses (member_id, stair_count, step_height_mm, rail, chair, updated_at)
    select ${MEMBER}, 10 + n % 8, 160 + n % 30, 'one side', true, now() from many`,
  `insert into readiness_screens (member_id, answered_at, answers, result, reasons, valid_until)
    select ${MEMBER}, now() - interval '85 days', '{}', 'clear', '[]', current_date + 280 from many`,
  `insert into subscriptions (id, member_id, plan_id, status, started_at, current_period_start, current_period_end, synced_at)
    select 'sub_many_' || n, ${MEMBER}, (select id from plans order by position limit 1), 'active',
      now() - interval '85 days', now() - interval '10 days', now() + interval '20 days', now() from many`,
  `insert into flights (member_id, number, starts_on, emphasis, created_at)
    select ${MEMBER}, 1, current_date - ${DAY}, 'balanced', now() - interval '85 days' from many`,
  `insert into training_sessions (member_id, flight_id, week, ordinal, title, planned_at, done_at, minutes, effort, pain, share_done)
    select f.member_id, f.id, 1 + d / 7, 1 + d % 7 / 3, 'Push-ups, squats and sit-ups', at, at, 30 + d % 9, 5 + d % 4,
      'none', 90 + d % 30
    from flights f join many on f.member_id = ${MEMBER}, generate_series(0, ${DAY} - 2) d,
      lateral (select f.starts_on + d + time '18:00' as at) moment where d % 7 in (0, 3, 5)`,
  `insert into session_items (session_id, position, movement, rung, sets, amount, unit, effort_asked, rule, why, done_total, effort_done, pain)
    select s.id, p, m, r, 3, 8 + s.week, 'reps', 6, 'hold', 'It stays.', 3 * (8 + s.week), 6, 'none'
    from training_sessions s join many on s.member_id = ${MEMBER},
      (values (1, 'push', 'push-up-knees'), (2, 'squat', 'squat'), (3, 'sit-up', 'sit-up-tested')) item (p, m, r)`,
  `insert into marks (member_id, test, form, value, taken_at, effort)
    select ${MEMBER}, t, f, round(v * (1 + 0.004 * d) + (n * 7 + d * 13) % 5), now() - interval '1 day' * (${DAY} - d), 8
    from many, generate_series(0, ${DAY} - 1, 7) d,
      (values ('push-ups', 'floor', 15), ('sit-ups', 'feet held', 25), ('stairs', 'walking', 130)) test (t, f, v)`,
  `insert into check_ins (member_id, week_start, sent_at, words, went, sleep, soreness, effort, answered_at)
    select f.member_id, f.starts_on + w * 7, at, 'Three sessions. The second set felt like the first.', 4, 3, 2, 6,
      case when n % 9 > 0 or w < 2 then at + interval '5 hours' end
    from flights f join many on f.member_id = ${MEMBER}, generate_series(0, (${DAY} - 7) / 7) w,
      lateral (select f.starts_on + w * 7 + 5 + time '19:00' as at) moment where at < now()`,
  `insert into messages (member_id, author_id, by_coach, sent_at, words, check_in_id, read_at)
    select c.member_id, m.coach_id, true, c.answered_at, 'Steady. The same again.', c.id, c.answered_at
    from check_ins c join members m on m.user_id = c.member_id join many on c.member_id = ${MEMBER}
    where c.answered_at is not null`,
];

/** Fills a demo database up to `total` members, each with their weeks; a thousand of them have the same coach. */
export async function addManyMembers(databaseUrl, total) {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    const { rows } = await client.query('select count(*)::int as there from members');
    await client.query('create temporary table many as select n from generate_series(1, $1::int) n', [
      total - rows[0].there,
    ]);
    for (const statement of STATEMENTS) await client.query(statement);
    await client.query('analyze');
  } finally {
    await client.end();
  }
}
