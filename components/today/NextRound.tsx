import { useRouter, type Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { newKey } from '@/components/data/apiClient';
import { errorMessage } from '@/components/data/apiError';
import { useStartRound } from '@/components/data/useRound';
import { Box } from '@/components/ui/Box';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Discs } from '@/components/ui/Discs';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { Reason } from '@/scheduling/planning/types';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatClock, formatMinutes } from '@/shared/display';
import { reasonText } from '@/shared/reasons';
import { roundHeadline } from '@/shared/roundWords';
import { SkipRound } from './SkipRound';

type TodayRound = TodayResponse['rounds'][number];

/** The one round that counts now: the running one, else the next that waits. */
export function nextRound(today: TodayResponse): TodayRound | null {
  return today.rounds.find((round) => round.state === 'running') ?? today.rounds.find((round) => round.state === 'waiting') ?? null;
}

/** The answer of the day in words, why, and the button that starts it. */
export function NextRound({ today, yard }: { today: TodayResponse; yard: YardResponse }): ReactElement {
  const round = nextRound(today);
  return (
    <Card tone="hero" padding={20} gap={12}>
      <Box aria-hidden style={{ position: 'absolute', right: -30, top: -34, pointerEvents: 'none' }}>
        <Discs width={250} height={250} color="heroDisc" opacity={0.55} discs={[{ x: 44, y: 34, r: 30 }, { x: 66, y: 50, r: 32 }]} />
      </Box>
      {today.runningRoundId !== null ? <Running yard={yard} roundId={today.runningRoundId} />
        : round === null ? <NothingToday today={today} yard={yard} /> : <Waiting today={today} yard={yard} round={round} />}
    </Card>
  );
}

function Running({ yard, roundId }: { yard: YardResponse; roundId: string }): ReactElement {
  return (
    <Stack gap={12}>
      <Text variant="heading2" color="onHero">The water is running.</Text>
      <Text color="onHeroSoft">Somebody has started the round. It ends when one of you says that the water is off.</Text>
      <LinkButton kind="sun" block label="Go to the round" href={`/yards/${yard.id}/rounds/${roundId}` as Href} />
    </Stack>
  );
}

function NothingToday({ today, yard }: { today: TodayResponse; yard: YardResponse }): ReactElement {
  const done = today.rounds.filter((round) => round.state === 'done').length;
  const next = today.nextSet;
  const zone = next === null ? undefined : yard.zones.find((one) => one.id === next.zoneId);
  return (
    <Stack gap={8}>
      <Text variant="heading2" color="onHero">{done > 0 ? 'Done for today.' : 'No water today.'}</Text>
      <Text color="onHeroSoft">
        {next === null ? 'No set is due in the coming ten days.'
          : `Next: ${zone?.name ?? 'a zone'}, ${dayWord(next.on, today.today)} at ${formatClock(next.startMinutes, yard.units)}.`}
      </Text>
    </Stack>
  );
}

function Waiting({ today, yard, round }: { today: TodayResponse; yard: YardResponse; round: TodayRound }): ReactElement {
  const router = useRouter();
  const start = useStartRound(yard.id);
  // One id for this round however often the button is pressed.
  const [roundId] = useState(newKey);
  const first = round.sets[0];
  const zone = yard.zones.find((one) => one.id === first?.zoneId);
  const begin = () => {
    start.mutate({ id: roundId, on: today.today, roundIndex: round.roundIndex }, {
      onSuccess: (answer) => router.push(`/yards/${yard.id}/rounds/${answer.id}` as Href),
    });
  };
  const reason = first?.reasons[0];
  const rain = first?.reasons.find((one) => one.code === 'no_rain_before');
  const early = round.startMinutes - today.nowMinutes;
  // A round that is begun late ends as much later.
  const late = Math.max(0, -early);
  const headline = roundHeadline(round.sets.length, round.moves, round.endMinutes + late, yard.units, round.kind);
  return (
    <Stack gap={12}>
      <Stack gap={4}>
        <Text variant="heading2" color="onHero">{headline}</Text>
        {reason ? (
          <Text color="onHeroSoft">{`${zone?.name ?? ''}: ${reasonText(reason as Reason, yard.units, today.today)}${rain && rain !== reason ? ` ${reasonText(rain as Reason, yard.units, today.today)}` : ''}`}</Text>
        ) : null}
        {early > 10 ? <Text color="onHeroSoft">{`Planned for ${formatClock(round.startMinutes, yard.units)}, in ${formatMinutes(early)}.`}</Text> : null}
        {late > 10 ? <Text color="onHeroSoft">{`It was planned for ${formatClock(round.startMinutes, yard.units)}; the end counts from now.`}</Text> : null}
      </Stack>
      {yard.abilities['round.run'] ? (
        <Stack gap={8}>
          <Button kind="sun" block label="Start the round" onPress={begin} pending={start.isPending} />
          <Text variant="small" color="onHeroSoft">Lay the hose clear of walks and steps, and keep children off a hose that has lain in the sun: the first water can scald.</Text>
          <SkipRound yard={yard} today={today} roundIndex={round.roundIndex} />
        </Stack>
      ) : null}
      {start.error ? <Notice tone="problem">{errorMessage(start.error)}</Notice> : null}
    </Stack>
  );
}
