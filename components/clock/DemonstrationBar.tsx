import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useServerNow } from '@/components/data/now';
import { useClock, useJumpClock } from '@/components/data/useClock';
import { Button } from '@/components/ui/Button';
import { Row } from '@/components/ui/Row';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import { VisuallyHidden } from '@/components/ui/VisuallyHidden';

type Jump = 'hour' | 'next_event' | 'day';
const jumps: readonly { to: Jump; label: string }[] = [
  { to: 'hour', label: 'An hour on' },
  { to: 'next_event', label: 'To the next event' },
  { to: 'day', label: 'A day on' },
];

/** Tells the demonstration's time and moves it. Nothing stands here in a real service. */
export function DemonstrationBar(): ReactElement | null {
  const clock = useClock();
  return clock.data?.isDemonstration ? <Bar timeZone={clock.data.timeZone} /> : null;
}

function Bar({ timeZone }: { timeZone: string }): ReactElement {
  const now = useServerNow(1000);
  const jump = useJumpClock();
  const [jumping, setJumping] = useState<Jump | null>(null);
  const [said, setSaid] = useState('');
  const move = async (to: Jump) => {
    setJumping(to);
    setSaid('');
    try {
      const { happened } = await jump.mutateAsync({ to });
      setSaid(happened.length === 0 ? 'Nothing was due.' : happened.length === 1 ? `Happened: ${happened[0]?.what ?? ''}.` : `${happened.length} things happened, last: ${happened.at(-1)?.what ?? ''}.`);
    } catch (error) {
      setSaid(errorMessage(error));
    } finally {
      setJumping(null);
    }
  };
  const time = new Intl.DateTimeFormat('en-US', { timeZone, weekday: 'short', day: 'numeric', month: 'short', hour: 'numeric', minute: '2-digit' }).format(now);
  return (
    <section aria-label="Demonstration time" className="d-demo-bar">
      <Row gap={8} justify="space-between">
        <Text variant="small" tabular>{`Demonstration · ${time}`}</Text>
        <Row gap={8}>
          {jumps.map(({ to, label }) => (
            <Button key={to} size="small" label={label} pending={jumping === to} disabled={jumping !== null && jumping !== to} onPress={() => void move(to)} />
          ))}
          <TextLink kind="standalone" href="/demo/mail">Mail</TextLink>
        </Row>
      </Row>
      {said === '' ? <VisuallyHidden>{''}</VisuallyHidden> : <Text variant="small" color="inkSoft" role="status">{said}</Text>}
    </section>
  );
}
