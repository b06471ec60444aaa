import { useState, type ReactElement } from 'react';
import { Section } from '@/components/gallery/Section';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { DataTable } from '@/components/ui/DataTable';
import { EmptyState } from '@/components/ui/EmptyState';
import { SplitView } from '@/components/ui/SplitView';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';

interface Specimen {
  id: string;
  yard: string;
  need: string | null;
  donePct: number;
}

const specimens: readonly Specimen[] = [
  { id: 'a', yard: 'Fernwick Road', need: 'Seeded strip drying by 3 pm', donePct: 86 },
  { id: 'b', yard: 'Larkspur Court', need: null, donePct: 100 },
  { id: 'c', yard: 'Mill Pond Lane', need: 'No catch-cup test yet', donePct: 71 },
];

/** Tables, and list beside detail. The rows are made up for this page. */
export function ListSpecimens(): ReactElement {
  const [chosen, setChosen] = useState<string | null>('a');
  const detail = specimens.find((row) => row.id === chosen);
  return (
    <Section title="Lists">
      <SplitView
        listLabel="Yards"
        detailLabel="Chosen yard"
        list={
          <Card>
            <DataTable
              caption="Made-up yards"
              showCaption
              rows={specimens}
              rowKey={(row) => row.id}
              selectedKey={chosen ?? undefined}
              empty={<EmptyState title="No yards yet">Invite a client to see their yard here.</EmptyState>}
              columns={[
                { header: 'Yard', cell: (row) => row.yard, sortBy: (row) => row.yard },
                { header: 'What it needs', cell: (row) => (row.need === null ? 'On track' : <Tag tone="dry" label={row.need} />) },
                { header: 'Sets done', align: 'right', cell: (row) => `${row.donePct}%`, sortBy: (row) => row.donePct },
                { header: 'Look', cell: (row) => <Button size="small" label="Look" accessibleLabel={`Look at ${row.yard}`} onPress={() => setChosen(row.id)} /> },
              ]}
            />
          </Card>
        }
        detail={
          detail && (
            <Card padding={20}>
              <Text variant="heading2" level={3}>{detail.yard}</Text>
              <Text>{detail.need ?? 'On track'}</Text>
              <Button label="Back to all yards" onPress={() => setChosen(null)} />
            </Card>
          )
        }
        placeholder={<Card tone="quiet" padding={20}><Text>Choose a yard to see what it needs.</Text></Card>}
      />
      <Card>
        <DataTable caption="An empty table" columns={[{ header: 'Yard', cell: () => null }]} rows={[]} rowKey={() => ''} empty={<EmptyState level={3} title="No yards yet">Invite a client to see their yard here.</EmptyState>} />
      </Card>
    </Section>
  );
}
