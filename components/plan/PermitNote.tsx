import type { ReactElement } from 'react';
import { Notice } from '@/components/ui/Notice';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { YardResponse } from '@/shared/contracts/yards';
import { listed, permitState } from '@/shared/permitWords';

/** Permits that hold within the days of a plan, each with its last day; nothing when there is none. */
export function PermitNote({ plan, yard }: { plan: PlanResponse; yard: YardResponse }): ReactElement | null {
  const near = yard.permits.filter((permit) => permit.fromOn <= plan.toOn && permit.toOn >= plan.fromOn).flatMap((permit) => {
    const zones = yard.zones.filter((zone) => zone.seededOn !== null && permit.zoneIds.includes(zone.id)).map((zone) => zone.name);
    return zones.length === 0 ? [] : [{ permit, zones }];
  });
  if (near.length === 0) {
    return null;
  }
  return (
    <Notice tone="seed" title={near.length === 1 ? 'A permit is counted on' : 'Permits are counted on'}>
      <Stack gap={4}>
        {near.map(({ permit, zones }) => (
          <Text key={permit.id}>{`${permit.name}: ${listed(zones)} may be watered outside ${permit.liftsRuleIds === null ? 'the water rules' : 'the rules that it lifts'}. ${permitState(permit, plan.fromOn).text}.`}</Text>
        ))}
      </Stack>
    </Notice>
  );
}
