import { useWatch } from 'react-hook-form';
import type { ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { NumberField } from '@/components/ui/NumberField';
import { Row } from '@/components/ui/Row';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import type { UnitSystem } from '@/shared/contracts/common';
import { unitLabel } from '@/shared/display';
import type { SetUpForm } from './SetUpScreen';

/** Name, size and state of one zone in the set-up. */
export function ZoneFields({ form, index, units, onRemove }: { form: SetUpForm; index: number; units: UnitSystem; onRemove?: () => void }): ReactElement {
  const zone = useWatch({ control: form.control, name: `zones.${index}` });
  return (
    <Card padding={20} gap={16}>
      <Row justify="space-between">
        <Text variant="heading3" level={2}>{index === 0 ? 'A zone of the lawn' : `Zone ${index + 1}`}</Text>
        {onRemove ? <Button size="small" label="Remove" accessibleLabel={`Remove zone ${index + 1}`} onPress={onRemove} /> : null}
      </Row>
      <TextField control={form.control} name={`zones.${index}.name`} label="Name" hint="Where it is: front, south side, strip by the drive." />
      <ChoiceField control={form.control} name={`zones.${index}.size`} label="Size" look="segments" options={[{ value: 'sides', label: 'Two sides' }, { value: 'area', label: 'Area' }]} />
      {zone.size === 'area' ? (
        <NumberField control={form.control} name={`zones.${index}.area`} label="Area" unit={unitLabel('area', units)} />
      ) : (
        <Row gap={12} align="flex-start">
          <NumberField control={form.control} name={`zones.${index}.sideA`} label="One side" unit={unitLabel('length', units)} />
          <NumberField control={form.control} name={`zones.${index}.sideB`} label="Other side" unit={unitLabel('length', units)} />
        </Row>
      )}
      <ChoiceField control={form.control} name={`zones.${index}.seeded`} label="The grass is" look="segments" options={[{ value: 'established', label: 'Established' }, { value: 'seeded', label: 'Newly seeded' }]} />
      {zone.seeded === 'seeded' ? <DateField control={form.control} name={`zones.${index}.seededOn`} label="Sown on" /> : null}
    </Card>
  );
}
