import { JobInputSchema, type JobInput, type JobView } from '@/lib/shared/jobs';
import type { Supply } from '@/diagram/document/schema';

/** The form as typed: every field a text, so that nothing typed is lost or rounded on the way. */
export interface JobFormValues {
  title: string;
  client: string;
  clientPhone: string;
  clientEmail: string;
  address: string;
  practice: JobInput['practice'];
  system: Supply['system'];
  voltage: string;
  frequency: string;
  ze: string;
  zln: string;
  ra: string;
  hoursWanted: string;
  due: string;
  /** ids of the apprentices it is given to, sorted, a space between */
  given: string;
}
export type JobFormField = keyof JobFormValues;

export const NEW_JOB: JobFormValues = {
  title: '',
  client: '',
  clientPhone: '',
  clientEmail: '',
  address: '',
  practice: 'IEC',
  system: 'TN-S',
  voltage: '230',
  frequency: '50',
  ze: '',
  zln: '',
  ra: '',
  hoursWanted: '0',
  due: '',
  given: '',
};

const text = (value: number | undefined): string => (value === undefined ? '' : String(value));

export const valuesOf = (job: JobView): JobFormValues => ({
  title: job.title,
  client: job.client,
  clientPhone: job.clientPhone ?? '',
  clientEmail: job.clientEmail ?? '',
  address: job.address,
  practice: job.practice,
  system: job.supply.system,
  voltage: text(job.supply.voltage),
  frequency: text(job.supply.frequency),
  ze: text(job.supply.ze),
  zln: text(job.supply.zln),
  ra: text(job.supply.ra),
  hoursWanted: text(job.hoursWanted),
  due: job.due ?? '',
  given: [...(job.given ?? [])].sort().join(' '),
});

export type FieldErrors = Partial<Record<JobFormField, string>>;

/** Fields of the request that stand under another name in the form. */
const fieldOf = (path: string): string => path.replace(/^supply\.?/, '') || 'system';

/** Refusals of the server or the schema, by path, as errors of the form's fields. */
export const formErrors = (fields: Record<string, string>): FieldErrors =>
  Object.fromEntries(Object.entries(fields).map(([path, message]) => [fieldOf(path), message]));

const numbers: Record<'voltage' | 'frequency' | 'ze' | 'zln' | 'ra' | 'hoursWanted', { needed: boolean; wrong: string }> = {
  voltage: { needed: true, wrong: 'Volts as a number, 230 for most homes.' },
  frequency: { needed: true, wrong: 'Hertz as a number, 50 or 60.' },
  ze: { needed: false, wrong: 'Ohms as a number, like 0.35; leave it empty if it is not known.' },
  zln: { needed: false, wrong: 'Ohms as a number, like 0.25; leave it empty if it is not known.' },
  ra: { needed: false, wrong: 'Ohms as a number, like 20; leave it empty if it is not known.' },
  hoursWanted: { needed: true, wrong: 'Hours are 0 to 72.' },
};
const NUMBER = /^\d+([.,]\d+)?$/;

/**
 * Reads the form. Numbers take a comma or a point. Values that only the other earthing system has are left out.
 * @param kept parts of the supply that the form does not show and must not lose
 */
export function readForm(values: JobFormValues, kept: Partial<Supply> = {}): { ok: true; input: JobInput } | { ok: false; errors: FieldErrors } {
  const errors: FieldErrors = {};
  const read = (name: keyof typeof numbers): number | undefined => {
    const typed = values[name].trim();
    if (typed === '' && !numbers[name].needed) return undefined;
    if (!NUMBER.test(typed)) errors[name] = numbers[name].wrong;
    return Number(typed.replace(',', '.'));
  };
  const earthed = values.system === 'TT' ? { ra: read('ra') } : { ze: read('ze'), zeEarth: kept.zeEarth };
  const supply = { system: values.system, voltage: read('voltage'), frequency: read('frequency'), zln: read('zln'), ...earthed };
  const raw = {
    title: values.title,
    client: values.client,
    clientPhone: values.clientPhone,
    clientEmail: values.clientEmail.trim(),
    address: values.address,
    practice: values.practice,
    supply: Object.fromEntries(Object.entries(supply).filter(([, value]) => value !== undefined)),
    hoursWanted: read('hoursWanted'),
    due: values.due === '' ? null : values.due,
    given: values.given.split(' ').filter(Boolean),
  };
  const result = JobInputSchema.safeParse(raw);
  if (result.success && Object.keys(errors).length === 0) return { ok: true, input: result.data };
  const refused: Record<string, string> = {};
  for (const issue of result.error?.issues ?? []) refused[issue.path.join('.')] ??= issue.message;
  return { ok: false, errors: { ...formErrors(refused), ...errors } };
}
