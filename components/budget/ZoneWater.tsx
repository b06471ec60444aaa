import { lazy, Suspense, type ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { morningDepletionMm } from '@/scheduling/budget/morningDepletion';
import type { ObservationResponse } from '@/shared/contracts/ground';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { BudgetResponse } from '@/shared/contracts/water';
import type { YardResponse } from '@/shared/contracts/yards';
import { BudgetTable } from './BudgetTable';
import { DayTerms } from './DayTerms';
import { zoneSentence } from './zoneWords';

// The chart library is large; it comes when a chart is looked at.
const RootZoneChart = lazy(() => import('./RootZoneChart'));

/** Part of its zone that a position waters, by wetted area, at most all of it. */
function shareOf(positionId: string, yard: YardResponse): number {
  const position = yard.positions.find((one) => one.id === positionId);
  const zone = yard.zones.find((one) => one.id === position?.zoneId);
  const wetted = yard.positions.filter((one) => one.zoneId === zone?.id).reduce((sum, one) => sum + one.wettedAreaM2, 0);
  return position && zone ? position.wettedAreaM2 / Math.max(wetted, zone.areaM2) : 0;
}

/** One zone's water: a sentence, the curve, and the same days as a table. */
export function ZoneWater({ zone, yard, today, plan, checks }: {
  zone: BudgetResponse['zones'][number]; yard: YardResponse; today: string; plan: PlanResponse | null; checks: readonly ObservationResponse[];
}): ReactElement {
  const planned = (plan?.days ?? []).flatMap((day) => {
    const end = day.endDepletions.find((one) => one.zoneId === zone.zoneId);
    const setsMm = day.rounds.flatMap((round) => round.sets).filter((set) => set.zoneId === zone.zoneId).reduce((sum, set) => sum + set.depthMm * shareOf(set.positionId, yard), 0);
    return end === undefined ? [] : [{ on: day.on, depletionMm: end.depletionMm, setsMm }];
  });
  const facts = yard.zones.find((one) => one.id === zone.zoneId);
  const todayRow = zone.days.find((day) => day.on === today);
  return (
    <Card padding={20} gap={12}>
      <Row justify="space-between">
        <Text variant="heading2">{zone.name}</Text>
        {facts?.resting ? <Tag label="Resting by choice" tone="shade" /> : null}
        {facts?.seededOn ? <Tag label="Seeded" tone="seed" /> : null}
        {todayRow && morningDepletionMm(todayRow) >= todayRow.refillLineMm && !facts?.resting ? <Tag label="Past its refill line" tone="dry" /> : null}
      </Row>
      <Text>{zoneSentence(zone.days, today, yard.units)}</Text>
      {zone.days.length > 0 ? (
        <Suspense fallback={<Skeleton label="Loading the chart" height={300} />}>
          <RootZoneChart name={zone.name} days={zone.days} planned={planned} today={today} units={yard.units} />
        </Suspense>
      ) : null}
      {zone.days.length > 0 ? (
        <details className="w-details">
          <summary>{`How ${zone.name} comes to this, term by term`}</summary>
          <DayTerms days={zone.days} today={today} units={yard.units} name={zone.name} observations={checks} />
        </details>
      ) : null}
      {zone.days.length > 0 ? (
        <details className="w-details">
          <summary>{`Each day of ${zone.name} in numbers`}</summary>
          <Stack gap={12}>
            <BudgetTable days={zone.days} today={today} units={yard.units} name={zone.name} />
          </Stack>
        </details>
      ) : null}
    </Card>
  );
}
