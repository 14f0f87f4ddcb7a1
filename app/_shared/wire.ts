import * as z from 'zod/mini';
import { ROLES, type Role } from '@/app/_shared/roles';
import { NOTE_CLASSES, noteAnchorSchema, type NoteAnchor, type NoteClass } from '@/canvas/document/notes';
import { MAX_DOCUMENT_CHARACTERS } from '@/canvas/document/limits';

/*
 * What crosses the wire: the inputs of server actions as schemas (shared by form and action, every length bounded),
 * the answers as types. A document crosses as text and is validated on the server before it is stored.
 */

/** Text that says something, without the blanks about it. */
function line(missing: string, most: number, tooLong: string) {
  return z.string().check(z.trim(), z.minLength(1, missing), z.maxLength(most, tooLong));
}

export const idSchema = z.string().check(z.regex(/^[0-9A-Za-z_-]{10,32}$/, 'That is not an identifier of this application.'));
export const sheetNameSchema = line('Give the sheet a name.', 120, 'A sheet name has at most 120 characters.');
export const documentTextSchema = z
  .string()
  .check(z.maxLength(MAX_DOCUMENT_CHARACTERS, 'This sheet is larger than the server keeps (2 million characters).'));
export const revisionSchema = z.int().check(z.minimum(0), z.maximum(2_147_483_647));
export const passwordSchema = z
  .string()
  .check(
    z.minLength(10, 'A password has at least 10 characters.'),
    z.maxLength(200, 'A password has at most 200 characters.'),
  );
export const emailSchema = z
  .string()
  .check(
    z.trim(),
    z.toLowerCase(),
    z.maxLength(254, 'An e-mail address has at most 254 characters.'),
    z.email('That is not an e-mail address.'),
  );
export const noteTextSchema = line('Write the note first.', 4000, 'A note has at most 4000 characters.');

export const signUpInput = z.object({
  name: line('Say what colleagues call you.', 80, 'A name has at most 80 characters.'),
  email: emailSchema,
  password: passwordSchema,
  team: line('Give the team a name.', 80, 'A team name has at most 80 characters.'),
});
export const changePasswordInput = z.object({ current: z.string().check(z.minLength(1), z.maxLength(200)), next: passwordSchema });

export const createSheetInput = z.object({ name: sheetNameSchema });
export const importSheetInput = z.object({ text: documentTextSchema });
export const renameSheetInput = z.object({ id: idSchema, name: sheetNameSchema });
export const saveSheetInput = z.object({ id: idSchema, revision: revisionSchema, document: documentTextSchema });
export const sheetInput = z.object({ id: idSchema });
/** Clones the sheet as it stands, a snapshot of it, or (after a conflict) the text that this machine holds. */
export const cloneSheetInput = z.object({
  id: idSchema,
  snapshotId: z.optional(idSchema),
  document: z.optional(documentTextSchema),
  name: z.optional(sheetNameSchema),
});
export const takeSnapshotInput = z.object({
  id: idSchema,
  revision: revisionSchema,
  name: line('Give the snapshot a name.', 120, 'A snapshot name has at most 120 characters.'),
});
export const restoreSnapshotInput = z.object({ snapshotId: idSchema, revision: revisionSchema });
export const createNoteInput = z.object({
  sheetId: idSchema,
  anchor: noteAnchorSchema,
  class: z.enum(NOTE_CLASSES),
  text: noteTextSchema,
});
export const replyNoteInput = z.object({ noteId: idSchema, text: noteTextSchema });
export const noteInput = z.object({ noteId: idSchema });
export const changeRoleInput = z.object({ memberId: idSchema, role: z.enum(ROLES) });
export const memberInput = z.object({ memberId: idSchema });
export const listSheetsInput = z.object({
  search: z._default(z.string().check(z.maxLength(120)), ''),
  sort: z._default(z.enum(['changed', 'name', 'created']), 'changed'),
  archived: z._default(z.boolean(), false),
});
export type ListSheetsInput = z.infer<typeof listSheetsInput>;

/** Dates cross as ISO 8601 text in UTC. */
export type SheetListItem = {
  readonly id: string;
  readonly name: string;
  readonly purpose: string;
  readonly revision: number;
  readonly changedAt: string;
  readonly changedBy: string;
  readonly createdAt: string;
  readonly archived: boolean;
  readonly partCount: number;
  readonly snapshotCount: number;
  readonly openNoteCount: number;
  readonly origin: SheetOrigin | null;
};
export type SheetOrigin = {
  readonly sheetId: string;
  readonly sheetName: string;
  readonly snapshotName: string | null;
  readonly revision: number;
};
/** `more`: there are sheets beyond those that a list shows; a search narrows it. */
export type SheetList = { readonly sheets: readonly SheetListItem[]; readonly more: boolean };
export type SheetRecord = {
  readonly id: string;
  readonly name: string;
  readonly revision: number;
  readonly document: string;
  readonly changedAt: string;
  readonly changedBy: string;
  readonly archived: boolean;
  readonly origin: SheetOrigin | null;
  readonly teamName: string;
};
export type SaveOutcome =
  | { readonly kind: 'saved'; readonly revision: number; readonly savedAt: string }
  /** Someone else saved in between: what stands on the server now, for the person to choose. */
  | {
      readonly kind: 'conflict';
      readonly revision: number;
      readonly document: string;
      readonly changedAt: string;
      readonly changedBy: string;
    };
export type SnapshotListItem = {
  readonly id: string;
  readonly sheetId: string;
  readonly number: number;
  readonly name: string;
  readonly revision: number;
  readonly takenAt: string;
  readonly takenBy: string;
};
export type SnapshotRecord = SnapshotListItem & { readonly document: string; readonly sheetName: string };
export type NoteReply = { readonly id: string; readonly author: string; readonly text: string; readonly writtenAt: string };
export type NoteThread = {
  readonly id: string;
  /** Numbered from 1 on each sheet, in the order written; the number on the drawing. */
  readonly number: number;
  readonly anchor: NoteAnchor;
  readonly class: NoteClass;
  readonly text: string;
  readonly author: string;
  readonly writtenAt: string;
  readonly resolved: { readonly by: string; readonly at: string } | null;
  readonly replies: readonly NoteReply[];
};
export type MemberItem = {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly self: boolean;
  readonly joinedAt: string;
};
/** Who looks: what a page needs of the session, and no more. */
export type Viewer = {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly teamId: string;
  readonly teamName: string;
  readonly role: Role;
};
