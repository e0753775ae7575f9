import 'server-only';
import { hash, verify } from '@node-rs/argon2';
import { AppError } from '@/lib/server/errors';

/** argon2id, 19 MiB, 2 passes, 1 lane: the least that the OWASP password storage cheat sheet asks for (from memory). */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

export const hashPassword = (password: string): Promise<string> => hash(password, COST);

let nobody: Promise<string> | undefined;

/** True for the right password. With no hash to compare (an unknown address) it takes as long and is false. */
export async function isPassword(passwordHash: string | null | undefined, password: string): Promise<boolean> {
  nobody ??= hashPassword('the password of nobody at all');
  const right = await verify(passwordHash ?? (await nobody), password);
  return right && typeof passwordHash === 'string';
}

/** Passwords of ten characters and more that stand in every list of the commonest (from memory). */
const COMMON = [
  'password',
  'passw0rd',
  'qwertyuiop',
  'qwerty12345',
  'asdfghjkl',
  'zxcvbnm',
  '1234567890',
  '0123456789',
  '9876543210',
  'iloveyou',
  'letmein',
  'welcome',
  'sunshine',
  'princess',
  'football',
  'baseball',
  'superman',
  'administrator',
  'changeme',
  'trustno1',
  '1q2w3e4r',
  '1qaz2wsx',
  'abcdefghij',
  'electrician',
  'ohmstead',
];

/** What is left of a password without the digits and signs that people add at its ends. */
const core = (text: string) => text.toLowerCase().replace(/^[^a-z]+|[^a-z]+$/g, '');

/**
 * Refuses what is guessed first: common passwords with some digits at the end, one sign repeated, the person's own name
 * or address.
 * @param own name and e-mail address
 * @throws AppError invalid, naming the field
 */
export function checkPassword(password: string, own: readonly string[], field: string): void {
  const lower = password.toLowerCase();
  const left = core(password);
  const weak =
    new Set(lower).size < 4 ||
    COMMON.some(
      (common) => lower === common || (left !== '' && (left === core(common) || left === core(common).repeat(2))),
    ) ||
    own.some((text) => left.length > 2 && (core(text) === left || core(text.split('@')[0]!) === left));
  if (weak)
    throw new AppError('invalid', 'That password is one of the first that are tried.', {
      fields: { [field]: 'This is guessed early. Take another; a short sentence is easiest to keep in mind.' },
    });
}
