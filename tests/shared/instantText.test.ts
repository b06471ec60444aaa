import { instantText } from '@/shared/instantText';

describe('an instant in words', () => {
  it('is the day and the clock of the yard, not of the reader', () => {
    expect(instantText('2026-06-13T09:50:00.000Z', 'America/New_York', 'us')).toBe('Sat 13 Jun, 5:50 am');
    expect(instantText('2026-06-13T09:50:00.000Z', 'America/New_York', 'metric')).toBe('Sat 13 Jun, 5:50');
    // Beyond the date line it is the next day already (UTC+13 in Tonga, IANA tz database).
    expect(instantText(new Date('2026-06-13T12:30:00Z'), 'Pacific/Tongatapu', 'metric')).toBe('Sun 14 Jun, 1:30');
  });

  it('follows the clocks when they are put back: two instants read 1:30 (1 November 2026, IANA tz database)', () => {
    expect(instantText('2026-11-01T05:30:00Z', 'America/New_York', 'us')).toBe('Sun 1 Nov, 1:30 am');
    expect(instantText('2026-11-01T06:30:00Z', 'America/New_York', 'us')).toBe('Sun 1 Nov, 1:30 am');
  });
});
