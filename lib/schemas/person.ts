import { z } from "zod";

export const roleSchema = z.enum(["technician", "engineer", "supervisor", "reviewer", "administrator"]);
export type Role = z.infer<typeof roleSchema>;

export const personSchema = z.object({
  id: z.string(),
  email: z.email(),
  name: z.string().min(1),
  roles: z.array(roleSchema).min(1),
  active: z.boolean(),
});
export type Person = z.infer<typeof personSchema>;

/** Who did something, as the journal keeps it. */
export const actorSchema = z.object({ id: z.string(), name: z.string() });
export type Actor = z.infer<typeof actorSchema>;

const passwordSchema = z
  .string()
  .min(12, "A password has at least 12 characters.")
  .refine((text) => new TextEncoder().encode(text).length <= 72, "A password has at most 72 bytes.");

export const signInSchema = z.object({
  email: z.string().trim().toLowerCase().min(1, "Enter your e-mail address.").max(200),
  password: z.string().min(1, "Enter your password.").max(200),
});
export type SignIn = z.infer<typeof signInSchema>;

/** The first-run page: names the site and makes its administrator. */
export const firstRunSchema = z.object({
  siteName: z.string().trim().min(1, "Name the site.").max(80),
  name: z.string().trim().min(1, "Enter your name.").max(80),
  email: z.email("Enter an e-mail address such as name@site.example.").max(200),
  password: passwordSchema,
});
export type FirstRun = z.infer<typeof firstRunSchema>;
