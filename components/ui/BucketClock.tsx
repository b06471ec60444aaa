import { useEffect, useState, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Row } from '@/components/ui/Row';
import { Text } from '@/components/ui/Text';

/** A stopwatch for the bucket test: press when the water goes in, press when the bucket is full. */
export function BucketClock({ onTime }: { onTime: (seconds: number) => void }): ReactElement {
  const [startedMs, setStartedMs] = useState<number | null>(null);
  const [passedMs, setPassedMs] = useState(0);
  useEffect(() => {
    if (startedMs === null) {
      return undefined;
    }
    const timer = setInterval(() => setPassedMs(performance.now() - startedMs), 100);
    return () => clearInterval(timer);
  }, [startedMs]);
  const press = () => {
    if (startedMs === null) {
      setPassedMs(0);
      setStartedMs(performance.now());
    } else {
      const seconds = Math.round((performance.now() - startedMs) / 100) / 10;
      setStartedMs(null);
      setPassedMs(seconds * 1000);
      onTime(seconds);
    }
  };
  return (
    <Row gap={12}>
      <Button label={startedMs === null ? 'Start the stopwatch' : 'Bucket is full'} onPress={press} />
      <Text variant="figure" tabular>{`${(passedMs / 1000).toFixed(1)} s`}</Text>
    </Row>
  );
}
