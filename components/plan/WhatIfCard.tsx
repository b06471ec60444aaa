import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useKeepChanges, useWhatIf } from '@/components/data/useWishes';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import type { PlanChange } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { ChangeDialog } from './ChangeDialog';
import { Difference } from './Difference';
import { changeText } from './wishWords';

/** Puts together what could be otherwise, shows what would come of it, and keeps it or forgets it. */
export function WhatIfCard({ yard, todayOn }: { yard: YardResponse; todayOn: string }): ReactElement {
  const [changes, setChanges] = useState<PlanChange[]>([]);
  const [adding, setAdding] = useState(false);
  const weigh = useWhatIf(yard.id);
  const keep = useKeepChanges(yard.id);
  const put = (next: PlanChange[]) => {
    setChanges(next);
    weigh.reset();
    if (next.length > 0) {
      weigh.mutate({ changes: next });
    }
  };
  const keepThem = () => {
    keep.mutate({ changes }, {
      onSuccess: () => {
        put([]);
        void showToast({ message: 'Kept. The plan is made anew with it.' });
      },
    });
  };
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>What if</Text>
      {changes.length === 0 ? <Text>A day without anybody, a helper for some hours, a zone that rests, a cap on the water: see what it changes before you keep it.</Text> : (
        <ul className="p-changes">
          {changes.map((change, index) => (
            <li key={JSON.stringify(change)}>
              <span>{changeText(change, yard, todayOn)}</span>
              <Button size="small" kind="plain" label="Leave out" accessibleLabel={`Leave out: ${changeText(change, yard, todayOn)}`} onPress={() => put(changes.filter((_, place) => place !== index))} />
            </li>
          ))}
        </ul>
      )}
      <Row><Button size="small" label={changes.length === 0 ? 'Try something' : 'And something else'} onPress={() => setAdding(true)} /></Row>
      <div role="status">{weigh.isPending ? <Text color="inkSoft">Planning with it …</Text> : null}</div>
      {weigh.error ? <Notice tone="problem" title="That could not be planned">{`${errorMessage(weigh.error)} Nothing was changed.`}</Notice> : null}
      {weigh.data && changes.length > 0 ? (
        <>
          <Difference yard={yard} todayOn={todayOn} found={weigh.data} />
          {keep.error ? <Notice tone="problem" title="It was not kept">{errorMessage(keep.error)}</Notice> : null}
          <Row>
            {yard.abilities['facts.edit'] ? <Button kind="hose" label="Keep it" pending={keep.isPending} onPress={keepThem} /> : null}
            <Button label="Forget it" onPress={() => put([])} />
          </Row>
        </>
      ) : null}
      {adding ? <ChangeDialog yard={yard} todayOn={todayOn} onClose={() => setAdding(false)} onAdd={(change) => {
        setAdding(false);
        put([...changes.filter((one) => JSON.stringify(one) !== JSON.stringify(change)), change]);
      }} /> : null}
    </Card>
  );
}
