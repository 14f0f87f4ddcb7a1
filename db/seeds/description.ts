import { z } from 'zod';
import { ROLES } from '@/app/_shared/roles';
import { NOTE_CLASSES, noteAnchorSchema } from '@/canvas/document/notes';

/** `accounts.json`: who is in the demonstration team. The password is the demonstration's only, and printed at start. */
export const accountsSchema = z.object({
  password: z.string().min(10),
  accounts: z
    .array(
      z.object({
        email: z.email().regex(/@saltmarsh\.example$/, 'an invented address ends in @saltmarsh.example'),
        name: z.string().min(1).max(80),
        role: z.enum(ROLES),
      }),
    )
    .min(1),
});

const sheet = z.string().describe('the name of a file in sheets/, without its ending');
const by = z.email().describe('the address of an account');
const text = z.string().min(1).max(4000);

/** `demonstration.json`: what is on the sheets beside their drawings. */
export const descriptionSchema = z.object({
  /** Who drew a sheet; the first designer where none is named. */
  drawnBy: z.record(sheet, by).default({}),
  snapshots: z.array(z.object({ sheet, name: z.string().min(1).max(120), by })).default([]),
  notes: z
    .array(
      z.object({
        sheet,
        anchor: noteAnchorSchema,
        class: z.enum(NOTE_CLASSES),
        text,
        by,
        replies: z.array(z.object({ by, text })).default([]),
        resolvedBy: by.optional(),
      }),
    )
    .default([]),
});
export type Description = z.infer<typeof descriptionSchema>;
