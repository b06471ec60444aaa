import type { ReactElement } from 'react';
import type { Control, FieldPath, FieldValues } from 'react-hook-form';
import { Row } from '@/components/ui/Row';
import { TimeField } from '@/components/ui/TimeField';
import type { spanFields } from './ruleForm';

const field = <T extends FieldValues>(name: keyof typeof spanFields) => name as FieldPath<T>;

/** The two spans of hours that a rule or a permit allows; a form with `spanFields`. */
export function AllowedHours<T extends FieldValues, O>({ control }: { control: Control<T, unknown, O> }): ReactElement {
  return (
    <>
      <Row gap={12} align="flex-start">
        <TimeField control={control} name={field<T>('from1')} label="Allowed from" />
        <TimeField control={control} name={field<T>('to1')} label="to" />
      </Row>
      <Row gap={12} align="flex-start">
        <TimeField control={control} name={field<T>('from2')} label="and from" />
        <TimeField control={control} name={field<T>('to2')} label="to" />
      </Row>
    </>
  );
}
