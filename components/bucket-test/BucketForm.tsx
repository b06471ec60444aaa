import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect, useState, type ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { keys } from '@/components/data/keys';
import { readDraft, writeDraft } from '@/components/data/sessionDraft';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { BucketClock } from '@/components/ui/BucketClock';
import { Card } from '@/components/ui/Card';
import { Form } from '@/components/ui/Form';
import { Notice } from '@/components/ui/Notice';
import { NumberField } from '@/components/ui/NumberField';
import { SelectField } from '@/components/ui/SelectField';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import type { BucketTestResponse, CreateBucketTestRequest, TapResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatFlow, formatRange, unitLabel } from '@/shared/display';
import { bucketDraftSchema, bucketPreview, bucketSchema, type BucketDraft } from './bucketDraft';

/** A stopwatch, what the bucket holds, and the flow that follows. */
export function BucketForm({ yard, tap }: { yard: YardResponse; tap: TapResponse }): ReactElement {
  const storageKey = `dapple.bucket-test.${tap.id}`;
  const [start] = useState((): BucketDraft => {
    const position = yard.positions.find(({ tapId }) => tapId === tap.id);
    const fresh: BucketDraft = { volume: '', seconds: '', hoseId: position?.hoseId ?? yard.hoses[0]?.id ?? '', sprinklerId: position?.sprinklerId ?? yard.sprinklers[0]?.id ?? '' };
    return readDraft(storageKey, bucketDraftSchema) ?? fresh;
  });
  const form = useForm<BucketDraft, unknown, CreateBucketTestRequest>({ resolver: zodResolver(bucketSchema(yard.units)), mode: 'onTouched', defaultValues: start });
  const draft = useWatch({ control: form.control }) as BucketDraft;
  const preview = bucketPreview(draft, yard.units);
  const save = useWrite<BucketTestResponse, CreateBucketTestRequest>((body) => ({ method: 'POST', path: `/yards/${yard.id}/taps/${tap.id}/bucket-tests`, body }), { stale: [keys.yard(yard.id)] });
  const [problem, setProblem] = useState<string>();
  useEffect(() => {
    writeDraft(storageKey, draft);
  }, [storageKey, draft]);
  const onSubmit = async (request: CreateBucketTestRequest) => {
    setProblem(undefined);
    try {
      const test = await save.mutateAsync(request);
      form.reset({ ...draft, volume: draft.volume, seconds: '' });
      void showToast({ message: `Saved: ${formatFlow(test.flowLpm, yard.units)}. The plan is made anew with it.` });
    } catch (error) {
      setProblem(showServerProblems(form, error, { volumeL: 'volume' }));
    }
  };
  const none = { value: '', label: 'None: straight from the tap' };
  return (
    <Card padding={20} gap={16}>
      <Text variant="heading3" level={2}>Time a bucket</Text>
      <ul className="b-notes">
        <li>Measure at the end, where the sprinkler stands: take it off, or hold it in the bucket with the water running as usual.</li>
        <li>Tap wide open, nothing else open in the house.</li>
        <li>Start the stopwatch when the water goes in, stop it when the bucket is full.</li>
      </ul>
      <BucketClock onTime={(seconds) => form.setValue('seconds', String(seconds), { shouldDirty: true, shouldTouch: true, shouldValidate: true })} />
      <Form form={form} onSubmit={onSubmit} submitLabel="Save this test" problem={problem} label="Bucket test"
        caution="Afterwards close the tap and leave the nozzle open: a hose kept under pressure defeats the backflow guard at the tap. Take the hose end out of the bucket.">
        <div className="b-fields">
          <NumberField control={form.control} name="volume" label="The bucket holds" unit={unitLabel('volume', yard.units)} />
          <NumberField control={form.control} name="seconds" label="Full after" unit="s" />
          <SelectField control={form.control} name="hoseId" label="Through the hose" options={[...yard.hoses.map(({ id, name }) => ({ value: id, label: name })), none]} />
          <SelectField control={form.control} name="sprinklerId" label="At the sprinkler" options={[...yard.sprinklers.map(({ id, name }) => ({ value: id, label: name })), { value: '', label: 'None: open hose end' }]} />
        </div>
        {preview === null ? null : (
          <div className="b-result" role="status">
            <Text variant="figure" color="waterInk">{formatFlow(preview.flowLpm, yard.units)}</Text>
            <Text color="waterInk">{`Between ${formatRange('flow', preview.range.low, preview.range.high, yard.units).replace(' to ', ' and ')}: buckets are off by up to 3 %, and a hand on the watch by half a second.`}</Text>
          </div>
        )}
        {preview?.isTooFast ? <Notice tone="info">It fills so fast that the watch alone may be off by more than 5 %. A bigger bucket or a bin tells more.</Notice> : null}
        {draft.sprinklerId === '' ? <Notice tone="info">An open hose end gives far more than what comes through a sprinkler. For the plan, measure at the sprinkler.</Notice> : null}
      </Form>
    </Card>
  );
}
