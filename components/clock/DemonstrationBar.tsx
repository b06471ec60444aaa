import { Link } from 'expo-router';
import { useEffect, useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useServerNow } from '@/components/data/now';
import { useClock, useJumpClock } from '@/components/data/useClock';
import { Anchor } from '@/components/ui/Anchor';
import { instantText } from '@/shared/instantText';

type Jump = 'hour' | 'next_event' | 'day';
const jumps: readonly { to: Jump; label: string; name: string }[] = [
  { to: 'hour', label: '+1 hour', name: '+1 hour: an hour on' },
  { to: 'next_event', label: 'Next event', name: 'Next event: to what is due next' },
  { to: 'day', label: '+1 day', name: '+1 day: a day on' },
];

/** Tells the demonstration's time and moves it. Nothing stands here in a real service. */
export function DemonstrationBar(): ReactElement | null {
  const clock = useClock();
  const isReal = clock.data?.isDemonstration === false;
  useEffect(() => {
    if (isReal) {
      delete document.documentElement.dataset.demonstration;
    }
  }, [isReal]);
  // The server has said with the page that this is a demonstration: the bar keeps its place while the time is asked for, and nothing moves.
  const isExpected = clock.data === undefined && typeof document !== 'undefined' && document.documentElement.dataset.demonstration !== undefined;
  return clock.data?.isDemonstration || isExpected ? <Bar timeZone={clock.data?.timeZone ?? null} /> : null;
}

function Bar({ timeZone }: { timeZone: string | null }): ReactElement {
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
  return (
    <section aria-label="Demonstration time" className="d-demo-bar">
      <div className="k-row">
        <span className="k-time">{timeZone === null ? 'Demonstration' : `Demonstration · ${instantText(now, timeZone, 'us')}`}</span>
        <div className="k-acts">
          {jumps.map(({ to, label, name }) => (
            <button key={to} type="button" className="k-act" aria-label={name} aria-busy={jumping === to || undefined} disabled={timeZone === null || (jumping !== null && jumping !== to)} onClick={() => void move(to)}>
              {label}
            </button>
          ))}
          <Link href="/demo/mail" asChild><Anchor className="k-act k-link">Mail</Anchor></Link>
        </div>
      </div>
      <p className="k-said" role="status">{jumping !== null ? 'Time moves on; what is due happens…' : said}</p>
    </section>
  );
}
