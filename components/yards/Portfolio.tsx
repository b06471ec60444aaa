import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { useYards } from '@/components/data/useYard';
import { useIsWide } from '@/components/theme/breakpoints';
import { Card } from '@/components/ui/Card';
import { DataTable } from '@/components/ui/DataTable';
import { SplitView } from '@/components/ui/SplitView';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { Reason } from '@/scheduling/planning/types';
import type { UnitSystem } from '@/shared/contracts/common';
import type { PortfolioResponse } from '@/shared/contracts/proposals';
import { reasonText } from '@/shared/reasons';
import { needText, type PortfolioYard } from './needWords';
import { RootZoneSpark } from './RootZoneSpark';
import { YardDetail } from './YardDetail';

/** The list of yards, and on a wide page what the chosen one is about. */
export function Portfolio({ portfolio, chosenId }: { portfolio: PortfolioResponse; chosenId: string | null }): ReactElement {
  const wide = useIsWide();
  const yards = useYards();
  const unitsOf = (yardId: string): UnitSystem => yards.data?.yards.find((yard) => yard.id === yardId)?.units ?? 'us';
  const chosen = portfolio.yards.find((yard) => yard.yardId === chosenId) ?? (wide ? portfolio.yards[0] ?? null : null);
  const hrefOf = (yard: PortfolioYard): Href => wide ? `/yards?yard=${yard.yardId}` : `/yards/${yard.yardId}/today`;
  const list = (
    <Card padding={wide ? 12 : 16}>
      <DataTable<PortfolioYard>
        caption="Your yards, most pressing first"
        rows={portfolio.yards}
        rowKey={(yard) => yard.yardId}
        selectedKey={chosen?.yardId}
        empty={<Text>No yard yet.</Text>}
        columns={[
          { header: 'Yard', cell: (yard) => <TextLink kind="title" href={hrefOf(yard)}>{yard.name}</TextLink>, sortBy: (yard) => yard.name },
          { header: 'What it needs', cell: (yard) => <Need yard={yard} units={unitsOf(yard.yardId)} /> },
          { header: 'Root-zone water, 14 days', cell: (yard) => <RootZoneSpark yard={yard} /> },
          { header: 'Sets done', align: 'right', cell: (yard) => (yard.setsPlanned === 0 ? '–' : <span className="y-whole">{`${yard.setsDone} of ${yard.setsPlanned}`}</span>), sortBy: (yard) => (yard.setsPlanned === 0 ? null : yard.setsDone / yard.setsPlanned) },
        ]}
      />
    </Card>
  );
  return (
    <SplitView list={list} listLabel="Yards" detailLabel="The chosen yard"
      detail={wide && chosen ? <YardDetail key={chosen.yardId} yard={chosen} units={unitsOf(chosen.yardId)} /> : null} />
  );
}

function Need({ yard, units }: { yard: PortfolioYard; units: UnitSystem }): ReactElement {
  if (yard.need !== null) {
    return <Tag label={needText(yard.need, units)} tone={yard.need.urgent ? 'dry' : 'seed'} />;
  }
  return (
    <Stack gap={4}>
      <Text color="inkSoft">{yard.note === null ? 'On track' : reasonText(yard.note as Reason, units)}</Text>
    </Stack>
  );
}
