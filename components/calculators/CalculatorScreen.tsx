import type { ReactElement, ReactNode } from 'react';
import { Card } from '@/components/ui/Card';
import { Form } from '@/components/ui/Form';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Segmented } from '@/components/ui/Segmented';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { AssumptionResponse } from '@/shared/contracts/calculators';
import { RuleField } from './RuleField';
import type { Rules } from './rules';
import type { Calculator } from './useCalculator';

export interface FieldGroup {
  title?: string;
  fields: readonly string[];
  note?: string;
}

export interface CalculatorScreenProps<R extends Rules, A> {
  title: string;
  /** The question, if it is not the title. */
  question: string;
  calculator: Calculator<R, A>;
  groups: readonly FieldGroup[];
  /** The answer in words and its drawing, for the values that stand there. */
  children: (answer: A) => ReactNode;
  /** What lies under the answer: tables and how it was reckoned. */
  more?: (answer: A) => ReactNode;
  assumptions: (answer: A) => readonly AssumptionResponse[];
  caution?: string;
  /** Sentences for numbers that cannot be together, by the field that the computation names. */
  impossibleWords?: Readonly<Record<string, string>>;
}

/** One question, its fields, and the answer that follows while a person types. */
export function CalculatorScreen<R extends Rules, A>({ title, question, calculator, groups, children, more, assumptions, caution, impossibleWords = {} }: CalculatorScreenProps<R, A>): ReactElement {
  const { rules, form, units, setUnits, answer, impossible, isExample } = calculator;
  return (
    <Screen title={title} headline={question} kicker={<TextLink href={'/calculators'}>All calculators</TextLink>}
      actions={<Segmented label="Units" value={units} onChange={setUnits} options={[{ value: 'us', label: 'US' }, { value: 'metric', label: 'Metric' }]} />}>
      <div className="k-columns">
        <div className="k-answer">
          {answer === null ? (
            <Notice tone="info">{impossible === null ? 'Put right what is marked, and the answer stands here.' : impossibleWords[impossible] ?? 'These numbers cannot be together: look at them again.'}</Notice>
          ) : <Card padding={20} gap={16}>{children(answer)}</Card>}
          {caution === undefined ? null : <Notice tone="caution">{caution}</Notice>}
        </div>
        <div className="k-form">
          <Card padding={20} gap={16}>
            <Form form={form} onSubmit={() => undefined} label={title}>
              {isExample ? (
                <div className="k-example">
                  <Tag label="An example" tone="shade" />
                  <Text color="inkSoft">Write your own numbers over it; the answer follows.</Text>
                </div>
              ) : null}
              {groups.map((group) => (
                <fieldset key={group.fields.join(' ')} className="k-group">
                  {group.title === undefined ? null : <legend>{group.title}</legend>}
                  <div className="k-fields">
                    {group.fields.map((name) => {
                      const rule = rules[name];
                      return rule === undefined ? null : <div key={name} data-kind={rule.kind}><RuleField control={form.control} name={name} rule={rule} units={units} /></div>;
                    })}
                  </div>
                  {group.note === undefined ? null : <Text color="inkSoft">{group.note}</Text>}
                </fieldset>
              ))}
            </Form>
          </Card>
        </div>
        <div className="k-rest">
          {answer === null ? null : (
            <Stack gap={16}>
              {more?.(answer)}
              <Assumed assumptions={assumptions(answer)} />
            </Stack>
          )}
        </div>
      </div>
    </Screen>
  );
}

/** What was not measured, and who says what it was taken for. */
function Assumed({ assumptions }: { assumptions: readonly AssumptionResponse[] }): ReactElement | null {
  return assumptions.length === 0 ? null : (
    <details className="k-more">
      <summary>What was assumed, and who says so</summary>
      <ul>
        {assumptions.map(({ field, method, source }) => <li key={`${field}: ${method}`}>{`${method.charAt(0).toUpperCase()}${method.slice(1)} (${source}).`}</li>)}
      </ul>
    </details>
  );
}
