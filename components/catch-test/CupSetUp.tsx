import { useState, type ReactElement } from 'react';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { NumberField } from '@/components/ui/NumberField';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { UnitSystem } from '@/shared/contracts/common';
import { unitLabel } from '@/shared/display';
import type { CupDraft, ReadCups } from './cupDraft';
import { setUpText } from './cupWords';
import type { CupForm } from './useCupForm';

const rulers: Record<CupDraft['ruler'], string> = { eighths: '1/8 in', inches: 'Inches', mm: 'mm' };

export interface CupSetUpProps {
  form: CupForm;
  draft: CupDraft;
  read: ReadCups;
  units: UnitSystem;
  /** Asks for flow and area: where no position tells what to expect. */
  asksFlow: boolean;
}

/** Where the cups stand and how they are read. Folded away once something has been read. */
export function CupSetUp({ form, draft, read, units, asksFlow }: CupSetUpProps): ReactElement {
  const [startsOpen] = useState(() => Object.values(draft.cells).every((cell) => cell.trim() === ''));
  const { control } = form;
  const length = unitLabel('length', units);
  return (
    <details className="ct-card" open={startsOpen}>
      <summary>
        <span className="ct-step">1</span>
        <span className="ct-summary">
          <Text variant="heading3" level={2}>Set the cups out</Text>
          <Text color="inkSoft">{setUpText(draft, read, units)}</Text>
        </span>
      </summary>
      <Stack gap={20}>
        <Text>Straight-sided cups, all alike, 3 to 6 in (75 to 150 mm) wide and as deep as you have. Set them level, in grass shorter than the cup.</Text>
        <ChoiceField control={control} name="kind" label="How they stand" look="segments" options={[{ value: 'grid', label: 'In a grid' }, { value: 'row', label: 'In one row' }]} />
        {draft.kind === 'grid' ? (
          <div className="ct-fields">
            <NumberField control={control} name="rows" label="Rows" whole />
            <NumberField control={control} name="columns" label="Cups in a row" whole />
            <NumberField control={control} name="spacing" label="Apart" unit={length} />
          </div>
        ) : (
          <>
            <Text>Start at the sprinkler and go straight out to the last wet grass. The last cup should be almost dry.</Text>
            <div className="ct-fields">
              <NumberField control={control} name="cups" label="Cups" whole />
              <NumberField control={control} name="rowSpacing" label="Apart" unit={length} />
              <NumberField control={control} name="firstDistance" label="First cup from the sprinkler" unit={length} />
            </div>
            <ChoiceField control={control} name="pattern" label="What the row stands for" options={[
              { value: 'full_circle', label: 'A circle', hint: 'Impact, whirling or fixed: outer cups stand for more ground.' },
              { value: 'strip', label: 'A strip', hint: 'The swing of an oscillating bar: every cup counts alike.' },
            ]} />
          </>
        )}
        <ChoiceField control={control} name="reading" label="How you read a cup" look="segments" options={[
          { value: 'depth', label: 'Ruler' }, { value: 'volume', label: 'Millilitres' }, { value: 'weight', label: 'Grams' },
        ]} />
        {draft.reading === 'depth' ? (
          <ChoiceField control={control} name="ruler" label="The ruler’s marks" look="segments"
            options={(units === 'us' ? (['eighths', 'inches', 'mm'] as const) : (['mm', 'inches', 'eighths'] as const)).map((value) => ({ value, label: rulers[value] }))} />
        ) : (
          <NumberField control={control} name="mouth" label="Cup’s inside width at the mouth" unit={unitLabel('bore', units)}
            hint={draft.reading === 'volume' ? 'Pour each cup into a measuring jug or syringe.' : 'Weigh each cup and take off the empty cup: 1 g of water is 1 mL.'} />
        )}
        {asksFlow ? (
          <>
            <Text>If you know them, these tell how long to run.</Text>
            <div className="ct-fields">
              <NumberField control={control} name="flow" label="Flow" unit={unitLabel('flow', units)} optional />
              <NumberField control={control} name="area" label="Area it wets" unit={unitLabel('area', units)} optional />
            </div>
          </>
        ) : null}
      </Stack>
    </details>
  );
}
