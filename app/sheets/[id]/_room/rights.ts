/** What the person may do in this room: asked of the permissions table by the page, so that no button promises more. */
export type RoomRights = {
  readonly save: boolean;
  readonly rename: boolean;
  readonly clone: boolean;
  /** Take a sheet out of the archive. */
  readonly unarchive: boolean;
  readonly takeSnapshot: boolean;
  readonly restoreSnapshot: boolean;
  readonly createNote: boolean;
  readonly replyNote: boolean;
  readonly resolveNote: boolean;
  readonly reopenNote: boolean;
};

/** Who sits here: for drafts, which are one person's own, and for words such as “you”. */
export type RoomPerson = { readonly userId: string; readonly name: string };
