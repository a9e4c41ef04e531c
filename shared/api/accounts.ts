import { z } from 'zod';
import { idSchema } from '../scene/schema';
import { roles } from '../show/roles';

export const roleSchema = z.enum(roles);
/** No line breaks: addresses and names go into mail headers. */
const line = (max: number) =>
  z
    .string()
    .trim()
    .min(1)
    .max(max)
    .regex(/^[^\r\n\0]*$/, 'No line breaks.');
export const emailSchema = z.string().trim().toLowerCase().max(254).email('That is no mail address.');
export const nameSchema = line(60);
/** bcrypt reads 72 bytes, so longer ones are refused and never cut in silence. */
export const passwordSchema = z
  .string()
  .min(12, 'At least 12 characters; a few words make a good one.')
  .refine((text) => new TextEncoder().encode(text).length <= 72, 'At most 72 bytes.');
export const tokenSchema = z.string().regex(/^[A-Za-z0-9_-]{20,128}$/);

export const userSchema = z.object({ id: idSchema, name: z.string(), email: z.string(), role: roleSchema });
export type User = z.infer<typeof userSchema>;

export const sessionSchema = z.object({
  user: userSchema.nullable(),
  crew: z.object({ id: idSchema, name: z.string() }).nullable(),
  /** True until the first lead exists. */
  setUpOpen: z.boolean(),
  /** True when mail is kept by the local fake and /mail shows it. */
  mailKept: z.boolean(),
});
export type Session = z.infer<typeof sessionSchema>;

export const signInSchema = z.object({ email: emailSchema, password: z.string().min(1).max(200) });
export const setUpSchema = z.object({
  token: tokenSchema,
  crewName: nameSchema,
  name: nameSchema,
  email: emailSchema,
  password: passwordSchema,
  demo: z.boolean(),
});
export type SetUp = z.infer<typeof setUpSchema>;
export const forgotSchema = z.object({ email: emailSchema });
export const resetSchema = z.object({ token: tokenSchema, password: passwordSchema });
export const changePasswordSchema = z.object({ old: z.string().max(200), password: passwordSchema });

export const invitationSchema = z.object({
  id: idSchema,
  email: z.string(),
  role: roleSchema,
  expiresAt: z.string(),
});
export type Invitation = z.infer<typeof invitationSchema>;
export const inviteSchema = z.object({ email: emailSchema, role: roleSchema });
export const readInvitationSchema = z.object({ token: tokenSchema });
export const invitationDetailsSchema = z.object({
  crewName: z.string(),
  email: z.string(),
  role: roleSchema,
});
export type InvitationDetails = z.infer<typeof invitationDetailsSchema>;
export const acceptSchema = z.object({ token: tokenSchema, name: nameSchema, password: passwordSchema });

export const memberSchema = userSchema.extend({ lastSignInAt: z.string().nullable() });
export type Member = z.infer<typeof memberSchema>;
export const crewSchema = z.object({
  id: idSchema,
  name: z.string(),
  members: z.array(memberSchema),
  invitations: z.array(invitationSchema),
});
export type Crew = z.infer<typeof crewSchema>;
export const changeRoleSchema = z.object({ role: roleSchema });

export const signInRecordSchema = z.object({
  id: z.string(),
  device: z.string(),
  since: z.string(),
  current: z.boolean(),
});
export type SignInRecord = z.infer<typeof signInRecordSchema>;

export const keptMailSchema = z.object({
  id: z.string(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  at: z.string(),
});
export type KeptMail = z.infer<typeof keptMailSchema>;
