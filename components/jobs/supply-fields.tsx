'use client';

import { SelectField, TextField } from '@/components/ui/field';
import type { FieldErrors, JobFormField, JobFormValues } from './form-values';

interface FieldsProps {
  values: JobFormValues;
  errors: FieldErrors;
  set<F extends JobFormField>(field: F, value: JobFormValues[F]): void;
}

const practices = [
  { value: 'IEC', label: 'IEC: international' },
  { value: 'IN', label: 'IN: India' },
  { value: 'GB', label: 'GB: Great Britain' },
];
const systems = [
  { value: 'TN-S', label: 'TN-S: earth on its own core' },
  { value: 'TN-C-S', label: 'TN-C-S: earth from the neutral' },
  { value: 'TT', label: "TT: the house's own electrode" },
];

/** Practice and supply, each with its unit and with where to read it. */
export function SupplyFields({ values, errors, set }: FieldsProps) {
  const number = (field: 'voltage' | 'frequency' | 'ze' | 'zln' | 'ra') => ({
    name: field,
    inputMode: 'decimal' as const,
    autoComplete: 'off',
    value: values[field],
    error: errors[field],
    onChange: (event: { target: { value: string } }) => set(field, event.target.value),
  });
  return (
    <div className="grid gap-x-8 gap-y-4 sm:grid-cols-2">
      <SelectField
        label="Practice"
        name="practice"
        options={practices}
        value={values.practice}
        error={errors.practice}
        hint="Decides colours, outlets, limits and the clauses that findings lean on."
        onChange={(event) => set('practice', event.target.value as JobFormValues['practice'])}
      />
      <SelectField
        label="Earthing"
        name="system"
        options={systems}
        value={values.system}
        error={errors.system}
        hint="On the supplier's label at the meter, or ask the supplier. An earth core that leaves for the garden is TT."
        onChange={(event) => set('system', event.target.value as JobFormValues['system'])}
      />
      <TextField label="Voltage, line to neutral" unit="V" hint="On the meter's plate." {...number('voltage')} />
      <TextField label="Frequency" unit="Hz" hint="On the meter's plate." {...number('frequency')} />
      {values.system === 'TT' ? (
        <TextField
          label="Earth electrode, RA"
          unit="Ω"
          optional
          hint="From the electrode test, with the electrode off its bar."
          {...number('ra')}
        />
      ) : (
        <TextField
          label="Earth loop at the origin, Ze"
          unit="Ω"
          optional
          hint="From the supplier, or read by loop tester between line and the supplier's earth."
          {...number('ze')}
        />
      )}
      <TextField
        label="Line-neutral loop at the origin, ZLN"
        unit="Ω"
        optional
        hint="Read by loop tester, or the voltage divided by the supplier's short-circuit current."
        {...number('zln')}
      />
    </div>
  );
}
