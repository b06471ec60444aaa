import type { ReactElement } from 'react';
import type { Control } from 'react-hook-form';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { NumberField } from '@/components/ui/NumberField';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import type { UnitSystem } from '@/shared/contracts/common';
import { unitOf, type Draft, type Rule } from './rules';

export interface RuleFieldProps<O> {
  control: Control<Draft, unknown, O>;
  name: string;
  rule: Rule;
  units: UnitSystem;
}

/** The field of one rule. */
export function RuleField<O>({ control, name, rule, units }: RuleFieldProps<O>): ReactElement {
  const { label, hint, defaultSource } = rule;
  const common = { control, name, label, ...(hint === undefined ? {} : { hint }), ...(defaultSource === undefined ? {} : { defaultSource }) };
  switch (rule.kind) {
    case 'choice': {
      const options = rule.options(units);
      return options.length <= 3 ? <ChoiceField<Draft, O> {...common} options={options} look="segments" /> : <SelectField<Draft, O> {...common} options={options} />;
    }
    case 'day':
      return <DateField<Draft, O> {...common} />;
    case 'list': {
      const unit = unitOf(rule, units);
      return <TextField<Draft, O> {...common} label={unit === undefined ? label : `${label} (${unit})`} maxLength={300} />;
    }
    case 'number':
    case 'optional': {
      const unit = unitOf(rule, units);
      return <NumberField<Draft, O> {...common} optional={rule.kind === 'optional'} whole={rule.whole ?? false} {...(unit === undefined ? {} : { unit })} />;
    }
  }
}
