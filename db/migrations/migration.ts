/**
 * One step of the schema's history. MariaDB commits by itself at every change of the schema, so a step is one
 * statement: it has happened, or it has not. A step that was released is never changed; another one follows it.
 */
export type Migration = {
  /** Sorts in the order of the list; the name under which it is remembered in the database. */
  readonly name: string;
  readonly up: string;
  readonly down: string;
};

/** An identifier is compared byte by byte: under the text collation two that differ in case would be one. */
export const ID = 'CHAR(20) CHARACTER SET ascii COLLATE ascii_bin';
export const HASH = 'CHAR(64) CHARACTER SET ascii COLLATE ascii_bin';
export const TABLE = 'ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci';
