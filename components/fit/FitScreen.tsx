import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect, useMemo, useRef, useState, type ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { readDraft, writeDraft } from '@/components/data/sessionDraft';
import { useVisitorUnits } from '@/components/data/useVisitorUnits';
import { Card } from '@/components/ui/Card';
import { Form } from '@/components/ui/Form';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { NumberField } from '@/components/ui/NumberField';
import { Screen } from '@/components/ui/Screen';
import { Segmented } from '@/components/ui/Segmented';
import { SelectField } from '@/components/ui/SelectField';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { FitHelp } from '@/scheduling/sprinkler/fitHelp';
import type { UnitSystem } from '@/shared/contracts/common';
import { unitLabel } from '@/shared/display';
import { hoseBores } from '@/shared/hoseBores';
import { z } from '@/shared/zod';
import { FitBars } from './FitBars';
import { answerFit, fitDraftSchema, fitExample, fitInUnits, fitSchema, type FitDraft, type FitQuestionAsked } from './fitDraft';
import { fitDetail, fitHeadline, helpWords } from './fitWords';

const storageKey = 'dapple.fit';
const keptSchema = z.object({ units: z.enum(['us', 'metric']), draft: fitDraftSchema });

/** Whether a lawn fits its tap and its hours, without an account. */
export function FitScreen(): ReactElement {
  const [units, setUnits] = useVisitorUnits();
  const shownUnits = useRef(units);
  const [start] = useState((): FitDraft => {
    const kept = readDraft(storageKey, keptSchema);
    return kept === null ? fitExample[units] : fitInUnits(kept.draft, kept.units, units);
  });
  const schema = useMemo(() => fitSchema(units), [units]);
  const form = useForm<FitDraft, unknown, FitQuestionAsked>({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: start });
  const draft = useWatch({ control: form.control }) as FitDraft;
  const { reset, getValues, control } = form;
  useEffect(() => {
    if (shownUnits.current !== units) {
      const next = fitInUnits(getValues(), shownUnits.current, units);
      shownUnits.current = units;
      reset(next);
    }
  }, [units, reset, getValues]);
  useEffect(() => writeDraft(storageKey, { units: shownUnits.current, draft }), [draft]);
  const asked = useMemo(() => {
    const checked = schema.safeParse(draft);
    return checked.success ? checked.data : null;
  }, [schema, draft]);
  const reckoned = useMemo(() => (asked === null ? null : answerFit(asked)), [asked]);
  const isExample = (Object.keys(fitExample[units]) as (keyof FitDraft)[]).every((field) => draft[field] === fitExample[units][field]);
  return (
    <Screen title="Does it fit?" kicker="Without an account"
      actions={<Segmented label="Units" value={units} onChange={setUnits} options={[{ value: 'us', label: 'US' }, { value: 'metric', label: 'Metric' }]} />}>
      <div className="f-columns">
        <div className="f-answer" role="status">
          {asked === null || reckoned === null ? <Notice tone="info">Put right what is marked, and the answer stands here.</Notice> : (
            <Card padding={20} gap={12}>
              <Text variant="heading2">{fitHeadline(reckoned.answer)}</Text>
              <FitBars answer={reckoned.answer} />
              <Text>{fitDetail(reckoned.answer, units)}</Text>
            </Card>
          )}
        </div>
        <div className="f-form"><Card padding={20} gap={16}>
          <Form form={form} onSubmit={() => undefined} label="Does it fit?">
            {isExample ? (
              <div className="f-example">
                <Tag label="An example" tone="shade" />
                <Text color="inkSoft">Write your own numbers over it; the answer follows.</Text>
              </div>
            ) : null}
            <div className="f-fields">
              <NumberField control={control} name="area" label="Area to water" unit={unitLabel('area', units)} />
              <NumberField control={control} name="depth" label="Depth a week" unit={unitLabel('depth', units)} />
              <NumberField control={control} name="flow" label="Flow at the sprinkler" unit={unitLabel('flow', units)} />
              <NumberField control={control} name="hours" label="Hours a week" unit="h" />
              <NumberField control={control} name="moves" label="Moves a week" whole />
              <NumberField control={control} name="moveMinutes" label="One move takes" unit="min" />
            </div>
            <Text color="inkSoft">Flow: time a bucket at the sprinkler’s end of the hose. Hours: only those when water is allowed and somebody is at home.</Text>
            <div className="f-fields">
              <NumberField control={control} name="hoseLength" label="Hose length" unit={unitLabel('length', units)} />
              <SelectField control={control} name="hoseBore" label="Hose inside width" options={hoseBores.map(({ mm, [units]: label }) => ({ value: String(mm), label }))} />
            </div>
          </Form>
        </Card></div>
        <div className="f-rest">
          <Stack gap={16}>
            {asked === null || reckoned === null || reckoned.helps.length === 0 ? null : <Helps asked={asked} helps={reckoned.helps} units={units} />}
            <Notice tone="info" title="Nothing of this is kept." actions={<LinkButton kind="hose" label="Make an account" href={'/sign-up'} />}>
              With an account Dapple plans each week within your hours and your water rule, and says early what will not fit.
            </Notice>
            <TextLink kind="standalone" href={'/cup-test'}>What does your sprinkler apply? Try a cup test</TextLink>
          </Stack>
        </div>
      </div>
    </Screen>
  );
}

function Helps({ asked, helps, units }: { asked: FitQuestionAsked; helps: readonly FitHelp[]; units: UnitSystem }): ReactElement {
  return (
    <Card padding={20} gap={16}>
      <Text variant="heading3" level={2}>What would help, each by itself</Text>
      <ul className="f-helps">
        {helps.map((help) => {
          const { title, text } = helpWords(help, asked, units);
          return (
            <li key={help.kind}>
              <h3>{title}</h3>
              <p>{text}</p>
            </li>
          );
        })}
      </ul>
    </Card>
  );
}
