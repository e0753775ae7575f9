/** The body of every refusal. `fields` names what to put right, by the path of the field. */
export interface ErrorAnswer {
  error: 'invalid' | 'signed-out' | 'forbidden' | 'missing' | 'conflict' | 'stale' | 'too-many' | 'too-large' | 'failed';
  /** what did not happen and what to do, for a person */
  message: string;
  fields?: Record<string, string>;
}
