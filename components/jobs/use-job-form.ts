'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useRef, useState } from 'react';
import { callApi } from '@/lib/shared/api-client';
import type { ErrorAnswer } from '@/lib/shared/errors';
import type { JobView } from '@/lib/shared/jobs';
import { NEW_JOB, formErrors, readForm, valuesOf, type FieldErrors, type JobFormField, type JobFormValues } from './form-values';

/** The form of a job: what is typed stays typed until it is saved, whatever the server says. */
export function useJobForm(job: JobView | null) {
  const router = useRouter();
  const [values, setValues] = useState<JobFormValues>(job ? valuesOf(job) : NEW_JOB);
  const [errors, setErrors] = useState<FieldErrors>({});
  const [refusal, setRefusal] = useState<ErrorAnswer | null>(null);
  const [busy, setBusy] = useState(false);
  /** the job as somebody else saved it meanwhile */
  const [theirs, setTheirs] = useState<JobView | null>(null);
  const version = useRef(job?.version ?? 0);
  const [dirty, setDirty] = useState(false);

  useEffect(() => {
    if (!dirty) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [dirty]);

  const set = <F extends JobFormField>(field: F, value: JobFormValues[F]) => {
    setValues((before) => ({ ...before, [field]: value }));
    setErrors((before) => ({ ...before, [field]: undefined }));
    setDirty(true);
  };

  const save = async () => {
    const read = readForm(values, job?.supply);
    setRefusal(null);
    if (!read.ok) {
      setErrors(read.errors);
      return;
    }
    setBusy(true);
    const answer = job
      ? await callApi<JobView>('PATCH', `/api/jobs/${job.id}`, { ...read.input, version: version.current })
      : await callApi<JobView>('POST', '/api/jobs', read.input);
    setBusy(false);
    if (answer.ok) {
      setDirty(false);
      router.push(job ? '/jobs' : `/jobs/${answer.data.id}/survey`);
      router.refresh();
      return;
    }
    setErrors(formErrors(answer.refusal.fields ?? {}));
    setRefusal(answer.refusal);
    if (job && answer.refusal.error === 'conflict') {
      const newest = await callApi<JobView>('GET', `/api/jobs/${job.id}`);
      if (newest.ok) setTheirs(newest.data);
    }
  };

  return {
    values,
    errors,
    refusal,
    busy,
    theirs,
    set,
    save,
    /** Goes on from the newest version with what is typed here. */
    keepMine() {
      if (theirs) version.current = theirs.version;
      setTheirs(null);
      setRefusal(null);
    },
    takeTheirs() {
      if (!theirs) return;
      version.current = theirs.version;
      setValues(valuesOf(theirs));
      setTheirs(null);
      setRefusal(null);
      setDirty(false);
    },
  };
}
export type JobFormState = ReturnType<typeof useJobForm>;
