import { z } from 'zod';
import { quantities, unitsOf, type Quantity } from '@/lib/units/quantities';
import { projectRoles, type ProjectRole } from './permissions';

export const emailSchema = z.string().trim().toLowerCase().max(254).pipe(z.email('This is not an e-mail address.'));
export const nameSchema = z.string().trim().min(1, 'A name is needed.').max(120);
/** Length is what counts (NIST SP 800-63B 5.1.1.2); the upper limit only keeps hashing affordable. */
export const passwordSchema = z.string().min(12, 'At least 12 characters.').max(200);

export const invitePersonSchema = z.object({
  name: nameSchema,
  email: emailSchema,
  isAdministrator: z.boolean(),
  defaultRole: z.enum(projectRoles),
});
export type InvitePerson = z.infer<typeof invitePersonSchema>;

export const changePersonSchema = z.object({
  isAdministrator: z.boolean().optional(),
  defaultRole: z.enum(projectRoles).optional(),
  isActive: z.boolean().optional(),
});
export type ChangePerson = z.infer<typeof changePersonSchema>;

export const changePasswordSchema = z.object({ currentPassword: z.string().max(1000), newPassword: passwordSchema });
export const askForResetSchema = z.object({ email: emailSchema });
export const usePasswordLinkSchema = z.object({ token: z.string().min(20).max(200), newPassword: passwordSchema });

const isKnownUnit = ([quantity, unit]: [string, string]) =>
  (quantities as string[]).includes(quantity) && unitsOf(quantity as Quantity).includes(unit);

export const changeAccountSchema = z.object({
  name: nameSchema.optional(),
  theme: z.enum(['system', 'light', 'dark']).optional(),
  units: z
    .record(z.string().max(40), z.string().max(20))
    .refine((units) => Object.entries(units).every(isKnownUnit), 'A unit that is not known was chosen.')
    .optional(),
});
export type ChangeAccount = z.infer<typeof changeAccountSchema>;

export interface PersonRow {
  id: string;
  name: string;
  email: string;
  isAdministrator: boolean;
  defaultRole: ProjectRole;
  isActive: boolean;
  /** False until the invitation has been followed. */
  hasPassword: boolean;
}
