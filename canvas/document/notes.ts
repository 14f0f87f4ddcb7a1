import * as z from 'zod/mini';
import { MAX_COORDINATE } from './limits';

/** How much a note weighs; a major one must be closed before a snapshot is signed off. */
export const NOTE_CLASSES = ['major', 'minor', 'query', 'observation'] as const;
export type NoteClass = (typeof NOTE_CLASSES)[number];

const idText = z.string().check(z.minLength(1), z.maxLength(40));
const coordinate = z.number().check(z.minimum(-MAX_COORDINATE), z.maximum(MAX_COORDINATE));

/**
 * What a note is pinned to. A node has no identity of its own, so it is named by one of its pins: the note follows the
 * node through rewiring as long as that pin stands. `at` is where the pin stood when the note was written, and the
 * place to show it when its part is gone.
 */
export const noteAnchorSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('part'), part: idText, at: z.object({ x: coordinate, y: coordinate }) }),
  z.object({
    kind: z.literal('node'),
    part: idText,
    pin: z.string().check(z.minLength(1), z.maxLength(20)),
    at: z.object({ x: coordinate, y: coordinate }),
  }),
  z.object({ kind: z.literal('place'), at: z.object({ x: coordinate, y: coordinate }) }),
]);
export type NoteAnchor = z.infer<typeof noteAnchorSchema>;
