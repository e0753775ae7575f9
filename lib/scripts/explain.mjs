import { Stop } from './run.mjs';

const KNOWN = {
  ENOSPC: 'The disk is full. Make room and start again; nothing that was saved is lost.',
  EACCES: (error) =>
    `This user may not write ${error.path}. Give the folder to the user who runs npm, or run as its owner.`,
  EROFS: (error) => `${error.path} lies on a disk that cannot be written.`,
};

/** One line for a person; the whole error only for what nobody foresaw. Empty for a stop that was asked for. */
export function explain(error) {
  if (error instanceof Stop) return error.message && `\n${error.message}`;
  const known = KNOWN[error?.code];
  if (known) return `\n${typeof known === 'string' ? known : known(error)}`;
  return `\nOhmstead could not start, for a reason it does not know:\n${error?.stack ?? error}`;
}
