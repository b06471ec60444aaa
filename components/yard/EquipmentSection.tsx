import type { Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { HoseResponse, SprinklerResponse, TapResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatFlow, formatLength, formatQuantity } from '@/shared/display';
import { sprinklerKindWords } from '@/shared/zoneWords';
import { HoseDialog, SprinklerDialog, TapDialog } from './EquipmentDialogs';

type Open = { kind: 'tap'; tap: TapResponse | null } | { kind: 'hose'; hose: HoseResponse | null } | { kind: 'sprinkler'; sprinkler: SprinklerResponse | null } | null;

/** Taps with their flow, hoses, sprinklers. */
export function EquipmentSection({ yard }: { yard: YardResponse }): ReactElement {
  const [open, setOpen] = useState<Open>(null);
  const edits = yard.abilities['facts.edit'] === true;
  const close = () => setOpen(null);
  return (
    <Card padding={20} gap={16}>
      <Text variant="heading3" level={2}>Tap, hose, sprinkler</Text>
      {yard.taps.map((tap) => (
        <Line key={tap.id} name={tap.name} edits={edits} onChange={() => setOpen({ kind: 'tap', tap })}
          facts={`${formatFlow(tap.flowLpm, yard.units)}${tap.flowIsDefault ? ' (default, no bucket test yet)' : ' by bucket test'}${tap.shutOffTimer ? ', shut-off timer' : ''}`}
          link={{ href: `/yards/${yard.id}/taps/${tap.id}` as Href, words: 'Bucket test' }} />
      ))}
      {yard.hoses.map((hose) => (
        <Line key={hose.id} name={hose.name} edits={edits} onChange={() => setOpen({ kind: 'hose', hose })}
          facts={`${formatLength(hose.lengthM, yard.units)}, ${formatQuantity('bore', hose.boreMm, yard.units)} inside`} />
      ))}
      {yard.sprinklers.map((sprinkler) => (
        <Line key={sprinkler.id} name={sprinkler.name} edits={edits} onChange={() => setOpen({ kind: 'sprinkler', sprinkler })} facts={sprinklerKindWords[sprinkler.kind]} />
      ))}
      {edits ? (
        <Row gap={8}>
          <Button size="small" label="Add a tap" onPress={() => setOpen({ kind: 'tap', tap: null })} />
          <Button size="small" label="Add a hose" onPress={() => setOpen({ kind: 'hose', hose: null })} />
          <Button size="small" label="Add a sprinkler" onPress={() => setOpen({ kind: 'sprinkler', sprinkler: null })} />
        </Row>
      ) : null}
      {open?.kind === 'tap' ? <TapDialog yard={yard} tap={open.tap} onClose={close} /> : null}
      {open?.kind === 'hose' ? <HoseDialog yard={yard} hose={open.hose} onClose={close} /> : null}
      {open?.kind === 'sprinkler' ? <SprinklerDialog yard={yard} sprinkler={open.sprinkler} onClose={close} /> : null}
    </Card>
  );
}

function Line({ name, facts, edits, link, onChange }: { name: string; facts: string; edits: boolean; link?: { href: Href; words: string }; onChange: () => void }): ReactElement {
  return (
    <Row justify="space-between" align="flex-start" wrap={false}>
      <Stack gap={4} style={{ flexShrink: 1 }}>
        <Text variant="label">{name}</Text>
        <Text variant="small">{facts}</Text>
        {link ? <TextLink kind="standalone" href={link.href} aria-label={`${link.words} of ${name}`}>{link.words}</TextLink> : null}
      </Stack>
      {edits ? <Button size="small" label="Change" accessibleLabel={`Change ${name}`} onPress={onChange} /> : null}
    </Row>
  );
}
