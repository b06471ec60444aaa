import type { Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { PositionResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import type { ZoneResponse } from '@/shared/contracts/zones';
import { formatArea, formatCivilDay, formatNumber, formatRate } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { testExpiryWords } from '@/shared/testExpiry';
import { PositionDialog } from './PositionDialog';
import { ZoneDialog } from './ZoneDialog';
import { positionFacts, rateSourceWords, zoneFacts } from './yardWords';

/** The zones, each with its positions. */
export function ZoneSection({ yard }: { yard: YardResponse }): ReactElement {
  const [adding, setAdding] = useState(false);
  const edits = yard.abilities['facts.edit'] === true;
  return (
    <>
      {yard.zones.map((zone) => <ZoneCard key={zone.id} zone={zone} yard={yard} edits={edits} />)}
      {edits ? <Button label="Add a zone" onPress={() => setAdding(true)} /> : null}
      {adding ? <ZoneDialog yard={yard} zone={null} onClose={() => setAdding(false)} /> : null}
    </>
  );
}

function ZoneCard({ zone, yard, edits }: { zone: ZoneResponse; yard: YardResponse; edits: boolean }): ReactElement {
  const [open, setOpen] = useState<'zone' | 'position' | null>(null);
  const positions = yard.positions.filter((position) => position.zoneId === zone.id);
  return (
    <Card padding={20} gap={12} tone={zone.seededOn === null ? 'sheet' : 'seed'}>
      <Row justify="space-between" align="flex-start">
        <Stack gap={4} style={{ flexShrink: 1 }}>
          <Row gap={8}>
            <Text variant="heading2">{zone.name}</Text>
            {zone.seededOn !== null ? <Tag label={`Seeded ${formatCivilDay(zone.seededOn, 'short')}`} tone="seed" /> : null}
            {zone.resting ? <Tag label="Resting by choice" tone="shade" /> : null}
          </Row>
          <Text color="inkSoft">{`${formatArea(zone.areaM2, yard.units)} · ${zoneFacts(zone).join(' · ')}`}</Text>
        </Stack>
        {edits ? <Button size="small" label="Change" accessibleLabel={`Change ${zone.name}`} onPress={() => setOpen('zone')} /> : null}
      </Row>
      <TextLink kind="standalone" href={`/yards/${yard.id}/zones/${zone.id}/sun` as Href}>{`Sun on ${zone.name}`}</TextLink>
      {zone.seededOn !== null ? <TextLink kind="standalone" href={`/yards/${yard.id}/zones/${zone.id}/establishment` as Href}>Doses and stages of the sowing</TextLink> : null}
      {positions.length === 0 ? <Text>No position yet: without one nothing can be planned here.</Text> : (
        <Stack gap={12}>
          {positions.map((position) => <PositionLine key={position.id} position={position} yard={yard} edits={edits} />)}
        </Stack>
      )}
      {edits ? <Button size="small" label="Add a position" accessibleLabel={`Add a position in ${zone.name}`} onPress={() => setOpen('position')} /> : null}
      {open === 'zone' ? <ZoneDialog yard={yard} zone={zone} onClose={() => setOpen(null)} /> : null}
      {open === 'position' ? <PositionDialog yard={yard} zoneId={zone.id} position={null} onClose={() => setOpen(null)} /> : null}
    </Card>
  );
}

function PositionLine({ position, yard, edits }: { position: PositionResponse; yard: YardResponse; edits: boolean }): ReactElement {
  const [open, setOpen] = useState(false);
  const tap = yard.taps.find((one) => one.id === position.tapId)?.name;
  const sprinkler = yard.sprinklers.find((one) => one.id === position.sprinklerId)?.name;
  const place = yard.positions.indexOf(position) + 1;
  const own = positionFacts(position, yard.units);
  return (
    <Row gap={12} align="flex-start" wrap={false}>
      <span className="v-mark" aria-hidden="true">{place}</span>
      <Stack gap={4} style={{ flexGrow: 1, flexShrink: 1, minWidth: 0 }}>
        <Text variant="label">{position.name}</Text>
        <Text variant="small">{[sprinkler, tap, position.mark].filter(Boolean).join(' · ')}</Text>
        <Text variant="small">
          {`${formatRate(position.rateMmPerHour, yard.units)}, ${rateSourceWords[position.rateSource]}${position.lowQuarterUniformity === null ? '' : `, low-quarter uniformity ${formatNumber(position.lowQuarterUniformity, 2)}`}`}
        </Text>
        {own.length > 0 ? <Text variant="small">{capital(own.join(' · '))}</Text> : null}
        {position.testExpiredBecause !== null ? <Tag label={`Test again: ${testExpiryWords[position.testExpiredBecause]}`} tone="seed" /> : null}
        <Row gap={12}>
          <TextLink kind="standalone" href={`/yards/${yard.id}/positions/${position.id}/catch-test` as Href} aria-label={`Catch-cup test of ${position.name}`}>Catch-cup test</TextLink>
          {edits ? <Button size="small" kind="plain" label="Change" accessibleLabel={`Change position ${position.name}`} onPress={() => setOpen(true)} /> : null}
        </Row>
      </Stack>
      {open ? <PositionDialog yard={yard} zoneId={position.zoneId} position={position} onClose={() => setOpen(false)} /> : null}
    </Row>
  );
}
