'use client';

import { useEffect, useRef, type ReactNode } from 'react';
import { RefusalLine } from '@/components/frame/refusal-line';
import { Button, ButtonLink } from '@/components/ui/button';
import { CheckField, TextField } from '@/components/ui/field';
import type { PersonRow } from '@/lib/shared/people';
import { ClientField } from './client-field';
import { SupplyFields } from './supply-fields';
import type { JobFormState } from './use-job-form';
import { VersionConflict } from './version-conflict';

const FORM = 'job';

function Group({ title, children }: { title: string; children: ReactNode }) {
  return (
    <fieldset className="border-t-2 border-ink pt-4">
      <legend className="float-left mb-4 w-full text-head font-bold">{title}</legend>
      <div className="clear-both">{children}</div>
    </fieldset>
  );
}

/** Client, place, practice, supply, backup: what a job begins with and what may be put right later. */
export function JobForm({ form, apprentices }: { form: JobFormState; apprentices: readonly PersonRow[] }) {
  const { values, errors, set } = form;
  const element = useRef<HTMLFormElement>(null);
  const tried = useRef(false);
  useEffect(() => {
    // Once after each attempt: to the first field that is refused.
    if (!tried.current || form.busy) return;
    tried.current = false;
    element.current?.querySelector<HTMLElement>('[aria-invalid=true]')?.focus();
  });

  const text = (field: 'title' | 'clientPhone' | 'clientEmail' | 'address' | 'hoursWanted' | 'due') => ({
    name: field,
    value: values[field],
    error: errors[field],
    onChange: (event: { target: { value: string } }) => set(field, event.target.value),
  });

  return (
    <form
      ref={element}
      id={FORM}
      noValidate
      className="flex max-w-[760px] flex-col gap-6"
      onSubmit={(event) => {
        event.preventDefault();
        tried.current = true;
        void form.save();
      }}
    >
      <Group title="Client and place">
        <div className="grid gap-x-8 gap-y-4 sm:grid-cols-2">
          <ClientField
            value={values.client}
            error={errors.client}
            onChange={(value) => set('client', value)}
            onKnown={(client) => {
              if (values.clientPhone === '') set('clientPhone', client.phone);
              if (values.clientEmail === '') set('clientEmail', client.email);
            }}
          />
          <TextField label="Place" maxLength={120} hint="As it is to stand in the title block: Saltpan Lane 14" {...text('title')} />
          <TextField label="Telephone" optional type="tel" maxLength={40} {...text('clientPhone')} />
          <TextField label="E-mail" optional type="email" maxLength={254} {...text('clientEmail')} />
          <div className="sm:col-span-2">
            <TextField label="Address" optional maxLength={300} {...text('address')} />
          </div>
        </div>
      </Group>
      <Group title="Practice and supply">
        <SupplyFields values={values} errors={errors} set={set} />
      </Group>
      <Group title="Backup and date">
        <div className="grid gap-x-8 gap-y-4 sm:grid-cols-2">
          <TextField
            label="Hours of backup wanted"
            unit="h"
            inputMode="decimal"
            hint="At the load that stays on, with an aged battery. 0: no backup source."
            {...text('hoursWanted')}
          />
          <TextField label="Due" optional type="date" {...text('due')} />
        </div>
      </Group>
      {apprentices.length > 0 && (
        <Group title="Given to">
          <p className="mb-2 text-grey">An apprentice sees and draws in the jobs that are given to them, and in no other.</p>
          <div className="flex flex-wrap gap-x-6 gap-y-2">
            {apprentices.map(({ id, name }) => {
              const given = values.given.split(' ').filter(Boolean);
              return (
                <CheckField
                  key={id}
                  label={name}
                  checked={given.includes(id)}
                  onChange={(event) => set('given', (event.target.checked ? [...given, id].sort() : given.filter((other) => other !== id)).join(' '))}
                />
              );
            })}
          </div>
        </Group>
      )}
      {form.theirs && <VersionConflict mine={values} theirs={form.theirs} onMine={form.keepMine} onTheirs={form.takeTheirs} />}
    </form>
  );
}

/** The one action of the form, in the foot of the sheet where it is always in sight. */
export function JobFormActions({ form, isNew }: { form: JobFormState; isNew: boolean }) {
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
      <Button type="submit" form={FORM} solid size="large" disabled={form.busy}>
        {form.busy ? 'Saving' : isNew ? 'Begin the job' : 'Save'}
      </Button>
      <ButtonLink href="/jobs" size="large">
        Leave
      </ButtonLink>
      {form.refusal && !form.theirs && (
        <div className="min-w-0 flex-1 basis-64">
          <RefusalLine refusal={form.refusal} />
        </div>
      )}
    </div>
  );
}
