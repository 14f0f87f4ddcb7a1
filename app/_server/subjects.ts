import 'server-only';
import type { Viewer } from '@/app/_shared/wire';
import { ownsMember, ownsNote, ownsSheet, ownsSnapshot } from '@/db/queries/ownership';

/*
 * Whether the thing that an action or a handler is about belongs to the viewer's team, by the input's field that
 * names it: what `authorise` asks before it admits that something is forbidden rather than not there.
 */

export function sheetSubject(
  viewer: Viewer,
  input: { readonly id: string } | { readonly sheetId: string },
): Promise<boolean> {
  return ownsSheet(viewer, 'id' in input ? input.id : input.sheetId);
}

export function snapshotSubject(viewer: Viewer, input: { readonly snapshotId: string }): Promise<boolean> {
  return ownsSnapshot(viewer, input.snapshotId);
}

export function noteSubject(viewer: Viewer, input: { readonly noteId: string }): Promise<boolean> {
  return ownsNote(viewer, input.noteId);
}

export function memberSubject(viewer: Viewer, input: { readonly memberId: string }): Promise<boolean> {
  return ownsMember(viewer, input.memberId);
}
