import { fireEvent, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { SunDiary } from '@/components/sun/SunDiary';
import { daylightHoursOf, sunHeadline } from '@/components/sun/sunWords';
import type { ZoneSunResponse } from '@/shared/contracts/ground';
import { screenYard } from '../../factories/screenYard';
import { answerRequests, renderPart } from '../../setup/screenServer';

const yard = screenYard();
const zoneId = yard.zones[0]?.id ?? '';
const sun: ZoneSunResponse = {
  zoneId, zoneName: 'Front lawn', sunFrom: 'diary', today: '2026-06-13', pages: [{ on: '2026-06-10', sunnyHours: [9, 10], person: null }],
  months: Array.from({ length: 12 }, (_, index) => ({ month: index + 1, directSunHours: index === 5 ? 9.1 : index === 11 ? 0.1 : 4, openSunHours: 12, radiationShare: 0.6 })),
};
const sent = answerRequests(() => sun);
beforeEach(() => {
  sent.length = 0;
});

describe('the sun diary', () => {
  it('offers the hours of the day that is chosen and sends those that were ticked', async () => {
    const person = userEvent.setup();
    renderPart(<SunDiary yard={yard} sun={sun} />);
    // New York in June: sunrise 5:25, sunset 20:28 (almanac, to a few minutes)
    expect(screen.getByLabelText('5 am')).toBeTruthy();
    expect(screen.queryByLabelText('4 am')).toBeNull();
    await person.click(screen.getByLabelText('6 am'));
    await person.click(screen.getByLabelText('9 am'));
    // in December the day begins at 7:11: the tick at six is no longer meant
    fireEvent.change(screen.getByLabelText('Day'), { target: { value: '2025-12-15' } });
    expect(screen.queryByLabelText('6 am')).toBeNull();
    await person.click(screen.getByRole('button', { name: 'Write this day down' }));
    await waitFor(() => expect(sent).toEqual([{ method: 'PUT', path: `/yards/${yard.id}/zones/${zoneId}/sun-diary/2025-12-15`, body: { sunnyHours: [9] } }]));
  });

  it('lists its days and takes one out', async () => {
    const person = userEvent.setup();
    renderPart(<SunDiary yard={yard} sun={sun} />);
    expect(screen.getByText('10 June 2026: two hours of sun, from 9 am, 10 am')).toBeTruthy();
    await person.click(screen.getByRole('button', { name: 'Take out 10 June 2026' }));
    await waitFor(() => expect(sent.map((each) => each.method)).toEqual(['DELETE']));
  });
});

test('the headline names the brightest and the darkest month', () => {
  expect(sunHeadline(sun)).toBe('Front lawn: 9.1 h of sun a day in June, none in December.');
});

test('hours with any daylight are offered, all of them under a midnight sun', () => {
  expect(daylightHoursOf(5 * 60 + 25, 20 * 60 + 28)).toEqual(Array.from({ length: 16 }, (_, index) => index + 5));
  expect(daylightHoursOf(null, null)).toHaveLength(24);
});
