import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter, type Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { useFieldArray, useForm, type UseFormReturn } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { BucketClock } from '@/components/ui/BucketClock';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ErrorState } from '@/components/ui/ErrorState';
import { Form } from '@/components/ui/Form';
import { LinkButton } from '@/components/ui/LinkButton';
import { NumberField } from '@/components/ui/NumberField';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { SelectField } from '@/components/ui/SelectField';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { sprinklerKinds } from '@/shared/contracts/equipment';
import type { SetUpYardRequest, YardResponse } from '@/shared/contracts/yards';
import { unitLabel } from '@/shared/display';
import { sprinklerKindWords } from '@/shared/zoneWords';
import { hoseBores } from '@/shared/hoseBores';
import { emptySetUp, emptyZone, setUpSchema, type SetUpText } from './setUpForm';
import { ZoneFields } from './ZoneFields';

/** Second step: tap, hose, sprinkler and the lawn's zones, saved together; the first plan follows at once. */
export function SetUpScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error) {
    return <Screen title="Set up"><ErrorState title="The yard could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} /></Screen>;
  }
  if (!yard.data) {
    return <Screen title="Set up" width="form"><Skeleton label="Loading the yard" height={300} /></Screen>;
  }
  if (!yard.data.abilities['facts.edit']) {
    return (
      <Screen title="Set up" headline="The owner sets up this yard." width="form">
        <LinkButton label="Back to today" href={`/yards/${yardId}/today` as Href} />
      </Screen>
    );
  }
  return <SetUp yard={yard.data} />;
}

export type SetUpForm = UseFormReturn<SetUpText, unknown, SetUpYardRequest>;

function SetUp({ yard }: { yard: YardResponse }): ReactElement {
  const router = useRouter();
  const form: SetUpForm = useForm<SetUpText, unknown, SetUpYardRequest>({ resolver: zodResolver(setUpSchema(yard.units)), mode: 'onTouched', defaultValues: emptySetUp() });
  const zones = useFieldArray({ control: form.control, name: 'zones' });
  const save = useWrite<YardResponse, SetUpYardRequest>((body) => ({ method: 'POST', path: `/yards/${yard.id}/set-up`, body }), { stale: [keys.yard(yard.id), keys.yards, keys.portfolio] });
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (request: SetUpYardRequest) => {
    setProblem(undefined);
    try {
      await save.mutateAsync(request);
      router.replace(`/yards/${yard.id}/today` as Href);
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  const bores = hoseBores.map(({ mm, [yard.units]: label }) => ({ value: String(mm), label }));
  return (
    <Screen title="Set up" headline="What waters it, and how large is it?" kicker={`Step 2 of 2 · ${yard.name}`} width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Make the first plan" submitKind="sun" problem={problem}>
        <Card padding={20} gap={16}>
          <Text variant="heading3" level={2}>Tap, hose and sprinkler</Text>
          <TextField control={form.control} name="tapName" label="The tap" />
          <Text color="inkSoft">Hold the hose end, with the sprinkler’s nozzle off, into a bucket and time it. You can do it later; until then the plan takes a flow marked as a default.</Text>
          <BucketClock onTime={(seconds) => form.setValue('bucketSeconds', String(seconds), { shouldDirty: true, shouldValidate: true })} />
          <Row gap={12} align="flex-start">
            <NumberField control={form.control} name="bucketVolume" label="The bucket holds" unit={unitLabel('volume', yard.units)} optional />
            <NumberField control={form.control} name="bucketSeconds" label="Full after" unit="s" optional />
          </Row>
          <Row gap={12} align="flex-start">
            <NumberField control={form.control} name="hoseLength" label="Hose length" unit={unitLabel('length', yard.units)} />
            <SelectField control={form.control} name="hoseBore" label="Hose inside width" options={bores} defaultSource="the commonest garden hose" />
          </Row>
          <SelectField control={form.control} name="sprinklerKind" label="Sprinkler" options={sprinklerKinds.map((kind) => ({ value: kind, label: sprinklerKindWords[kind] }))} />
        </Card>
        {zones.fields.map((field, index) => (
          <ZoneFields key={field.id} form={form} index={index} units={yard.units} onRemove={zones.fields.length > 1 ? () => zones.remove(index) : undefined} />
        ))}
        <Stack gap={8}>
          <Button label="Another zone" onPress={() => zones.append(emptyZone(''))} />
          <Text variant="small">A zone is a part of the lawn with one grass, one soil and about the same sun. Grass, soil, slope and sun start as defaults, marked as such; so do your hours at home. Change them any time under Yard.</Text>
        </Stack>
      </Form>
    </Screen>
  );
}
