import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { Reason } from '@/scheduling/planning/types';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { reasonText } from '@/shared/reasons';

/** What will not be watered today, and why. */
export function ZonesWithout({ today, yard }: { today: TodayResponse; yard: YardResponse }): ReactElement | null {
  if (today.zonesWithout.length === 0) {
    return null;
  }
  return (
    <Card padding={20} gap={16}>
      <Text variant="heading3" level={2}>Not today</Text>
      {today.zonesWithout.map(({ zoneId, reasons }) => (
        <Stack key={zoneId} gap={4}>
          <Text variant="label">{yard.zones.find((zone) => zone.id === zoneId)?.name ?? 'A zone'}</Text>
          {reasons.map((reason, index) => <Text key={index} color="inkSoft">{reasonText(reason as Reason, yard.units, today.today)}</Text>)}
        </Stack>
      ))}
    </Card>
  );
}
