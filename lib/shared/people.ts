import { z } from 'zod';

export const ROLES = ['apprentice', 'electrician', 'trainer', 'admin'] as const;
export const RoleSchema = z.enum(ROLES);
export type PersonRole = z.infer<typeof RoleSchema>;

export const PersonParams = z.object({ personId: z.uuid() });

export const PasswordSchema = z
  .string()
  .min(10, 'Take at least 10 characters; a short sentence is easiest to keep in mind.')
  .max(200, 'At most 200 characters.');

export const InviteSchema = z.strictObject({
  name: z.string().trim().min(1, 'Name the person.').max(80),
  email: z.email('This is not an e-mail address.').max(254),
  roles: z.array(RoleSchema).min(1, 'Choose at least one role.').max(4),
});
export const AcceptInviteSchema = z.strictObject({ token: z.string().min(20).max(100), password: PasswordSchema });
export const ChangePasswordSchema = z.strictObject({ current: z.string().max(200), next: PasswordSchema });
/** What an admin may change of a person. */
export const PersonPatchSchema = z.strictObject({
  roles: z.array(RoleSchema).min(1, 'Choose at least one role.').max(4).optional(),
  active: z.boolean().optional(),
});

export interface PersonRow {
  id: string;
  name: string;
  email: string;
  initials: string;
  roles: PersonRole[];
  active: boolean;
  /** waiting: invited, no password yet */
  status: 'active' | 'waiting' | 'off';
  lastSeen: string | null;
}
