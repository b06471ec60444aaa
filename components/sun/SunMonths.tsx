import type { ReactElement } from 'react';
import { Text } from '@/components/ui/Text';
import type { ZoneSunResponse } from '@/shared/contracts/ground';
import { formatNumber } from '@/shared/display';
import { monthNames } from './sunWords';

/** Sun by month as bars over the length of the day; the figures stand beside them, so that the table needs no twin. */
export function SunMonths({ sun }: { sun: ZoneSunResponse }): ReactElement {
  const longest = Math.max(...sun.months.map((month) => month.openSunHours), 1);
  return (
    <div className="d-table-scroll">
      <table className="d-table n-months">
        <caption className="d-hidden">{`Sun on ${sun.zoneName} by month`}</caption>
        <thead>
          <tr>
            <th scope="col">Month</th>
            <th scope="col">Sun in the day</th>
            <th scope="col" data-align="right">Hours</th>
            <th scope="col" data-align="right">Light</th>
          </tr>
        </thead>
        <tbody>
          {sun.months.map((month) => (
            <tr key={month.month}>
              <th scope="row">{(monthNames[month.month - 1] ?? '').slice(0, 3)}</th>
              <td className="n-bar" aria-hidden="true">
                <span style={{ width: `${(100 * month.openSunHours) / longest}%` }}>
                  <span style={{ width: `${month.openSunHours > 0 ? (100 * Math.min(month.directSunHours, month.openSunHours)) / month.openSunHours : 0}%` }} />
                </span>
              </td>
              <td data-align="right">{`${formatNumber(month.directSunHours, 1)} of ${formatNumber(month.openSunHours, 1)}`}</td>
              <td data-align="right">{`${formatNumber(month.radiationShare * 100, 0)} %`}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <Text variant="small">Light is the part of the open sky’s radiation that reaches the zone under a typical sky (0.55 of the radiation above the air, common practice).</Text>
    </div>
  );
}
