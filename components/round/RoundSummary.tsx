import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { DataTable } from '@/components/ui/DataTable';
import { LinkButton } from '@/components/ui/LinkButton';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { RoundResponse, RoundSetResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { HALF_WAY } from '@/shared/roundWords';
import { skipWords } from '@/shared/skipWords';
import { minutesAt } from '@/shared/time';
import { setTitle } from './roundView';

function outcome(set: RoundSetResponse): string {
  switch (set.status) {
    case 'done': return 'Done';
    case 'cut_short': return 'Cut short';
    case 'skipped': return `Skipped: ${set.skipCause === null ? 'no cause given' : skipWords[set.skipCause].toLowerCase()}`;
    case 'running': return 'Running';
    case 'waiting': return 'Not begun';
  }
}

/** What a round came to. */
export function RoundSummary({ round, yard }: { round: RoundResponse; yard: YardResponse }): ReactElement {
  const clock = (instant: string | null) => (instant === null ? '–' : formatClock(minutesAt(new Date(instant), yard.timeZone), yard.units));
  const minutes = round.sets.reduce((sum, set) => sum + (set.minutesRun ?? 0), 0);
  return (
    <Screen title="Round" headline="The water is off." width="text" kicker={yard.name}>
      <Stack gap={20}>
        <Text variant="lead">{`${formatMinutes(minutes)} of water, off at ${clock(round.waterOffAt)}${round.waterOffBy ? `, said ${round.waterOffBy.name}` : ''}. The water budget and the plan are brought up to date.`}</Text>
        <Card padding={12}>
          <DataTable<RoundSetResponse>
            caption="Sets of this round"
            rows={round.sets}
            rowKey={(set) => set.id}
            empty={<Text>No set was in this round.</Text>}
            columns={[
              { header: 'Set', cell: (set) => `${setTitle(set, yard)}${set.halfWay ? `, ${HALF_WAY}` : ''}` },
              { header: 'What happened', cell: outcome },
              { header: 'Ran', align: 'right', cell: (set) => (set.minutesRun === null ? '–' : formatMinutes(set.minutesRun)) },
              { header: 'Depth', align: 'right', cell: (set) => (set.gaveMm === null ? '–' : formatDepth(set.gaveMm, yard.units)) },
            ]}
          />
        </Card>
        <Row>
          <LinkButton kind="hose" label="Back to today" href={`/yards/${yard.id}/today` as Href} />
          <LinkButton label="See the water budget" href={`/yards/${yard.id}/water` as Href} />
        </Row>
      </Stack>
    </Screen>
  );
}
