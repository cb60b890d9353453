import { describe, expect, it } from 'vitest';
import { pegColumns, type PaidStretch } from './peg-columns.ts';

const MONTHS = ['2026-08', '2026-09', '2026-10', '2026-11'];
const stretch = (more: Partial<PaidStretch> & { memberId: string }): PaidStretch => ({
  from: '2026-08-03',
  trialUntil: null,
  endedOn: null,
  failed: false,
  ...more,
});

describe('the ledger', () => {
  it('stands the members in the order they came, from their first month on', () => {
    expect(
      pegColumns(
        [
          stretch({ memberId: 'late', from: '2026-10-31' }),
          stretch({ memberId: 'early', from: '2026-01-01' }),
        ],
        MONTHS,
        '2026-11-10',
      ),
    ).toEqual([
      ['coach', 'coach', 'coach', 'coach'],
      [null, null, 'coach', 'coach'],
    ]);
  });

  it('shows a month that only tried as a trial, and a failed card in the present month', () => {
    expect(
      pegColumns(
        [
          stretch({ memberId: 'a', from: '2026-10-25', trialUntil: '2026-11-12' }),
          stretch({ memberId: 'b', failed: true }),
          stretch({ memberId: 'c', trialUntil: '2026-08-17' }),
          stretch({ memberId: 'd', from: '2026-10-27', trialUntil: '2026-11-09' }),
        ],
        MONTHS,
        '2026-11-10',
      ),
    ).toEqual([
      ['coach', 'coach', 'coach', 'failed'],
      ['coach', 'coach', 'coach', 'coach'],
      [null, null, 'trial', 'trial'],
      [null, null, 'trial', 'coach'],
    ]);
  });

  it('marks the month of leaving, leaves the rest empty, and takes up who came back', () => {
    expect(
      pegColumns(
        [
          stretch({ memberId: 'a', endedOn: '2026-09-12' }),
          stretch({ memberId: 'a', from: '2026-11-02' }),
          stretch({ memberId: 'b', endedOn: '2026-09-12' }),
          stretch({ memberId: 'b', from: '2026-09-20' }),
          stretch({ memberId: 'gone', from: '2025-01-01', endedOn: '2026-07-31' }),
        ],
        MONTHS,
        '2026-11-10',
      ),
    ).toEqual([
      ['coach', 'left', null, 'coach'],
      ['coach', 'coach', 'coach', 'coach'],
    ]);
  });
});
