import { useState, type ReactElement } from 'react';
import { serverNow } from '@/components/data/now';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Tag, type Tone } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import type { PermitResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay } from '@/shared/display';
import { listed, permitState, type PermitPhase } from '@/shared/permitWords';
import { civilDayAt } from '@/shared/time';
import { PermitDialog } from './PermitDialog';
import { permitText } from './ruleWords';

const tones: Record<PermitPhase, Tone> = { coming: 'neutral', holding: 'seed', ended: 'shade' };

/** Leave to water seeded ground outside the rules, each with its last day and who gave it. */
export function PermitsSection({ yard }: { yard: YardResponse }): ReactElement | null {
  const [open, setOpen] = useState<PermitResponse | 'new' | null>(null);
  const edits = yard.abilities['facts.edit'] === true;
  const today = civilDayAt(serverNow(), yard.timeZone);
  if (yard.permits.length === 0 && (!edits || yard.zones.length === 0)) {
    return null;
  }
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Permits for seed</Text>
      {yard.permits.length === 0 ? <Text color="inkSoft">None given. Many towns let new seed be watered outside the rules for some weeks, if you ask first.</Text> : null}
      {yard.permits.map((permit) => {
        const state = permitState(permit, today);
        const idle = yard.zones.filter((zone) => permit.zoneIds.includes(zone.id) && zone.seededOn === null).map((zone) => zone.name);
        return (
          <Stack key={permit.id} gap={4}>
            <Row gap={8}>
              <Text variant="label">{permit.name}</Text>
              <Tag label={state.text} tone={tones[state.phase]} />
            </Row>
            <Text>{permitText(permit, yard)}</Text>
            {idle.length > 0 && state.phase !== 'ended' ? <Text color="inkSoft">{`No sowing is told for ${listed(idle)}: it changes nothing there.`}</Text> : null}
            <Text variant="small">{`${permit.source.replace(/\.$/, '')}, read ${formatCivilDay(permit.sourceOn, 'dated')}`}</Text>
            {edits ? <Button size="small" label="Change" accessibleLabel={`Change ${permit.name}`} onPress={() => setOpen(permit)} /> : null}
          </Stack>
        );
      })}
      {edits ? <Button size="small" label="Add a permit" onPress={() => setOpen('new')} /> : null}
      {open !== null ? <PermitDialog yard={yard} permit={open === 'new' ? null : open} onClose={() => setOpen(null)} /> : null}
    </Card>
  );
}
