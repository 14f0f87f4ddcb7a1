import { ID, TABLE, type Migration } from './migration';

export const notes: readonly Migration[] = [
  {
    name: '0003-notes-1-notes',
    up: `CREATE TABLE notes (
      id ${ID} NOT NULL PRIMARY KEY,
      sheetId ${ID} NOT NULL,
      number INT NOT NULL,
      anchor VARCHAR(600) NOT NULL,
      class ENUM('major', 'minor', 'query', 'observation') NOT NULL,
      text VARCHAR(4000) NOT NULL,
      writtenAt DATETIME(3) NOT NULL,
      writtenBy ${ID} NOT NULL,
      resolvedAt DATETIME(3) NULL,
      resolvedBy ${ID} NULL,
      UNIQUE KEY notes_sheet_number (sheetId, number),
      CONSTRAINT notes_sheetId FOREIGN KEY (sheetId) REFERENCES sheets (id),
      CONSTRAINT notes_writtenBy FOREIGN KEY (writtenBy) REFERENCES users (id),
      CONSTRAINT notes_resolvedBy FOREIGN KEY (resolvedBy) REFERENCES users (id)
    ) ${TABLE}`,
    down: 'DROP TABLE notes',
  },
  {
    name: '0003-notes-2-replies',
    up: `CREATE TABLE replies (
      id ${ID} NOT NULL PRIMARY KEY,
      noteId ${ID} NOT NULL,
      text VARCHAR(4000) NOT NULL,
      writtenAt DATETIME(3) NOT NULL,
      writtenBy ${ID} NOT NULL,
      KEY replies_note_written (noteId, writtenAt),
      CONSTRAINT replies_noteId FOREIGN KEY (noteId) REFERENCES notes (id),
      CONSTRAINT replies_writtenBy FOREIGN KEY (writtenBy) REFERENCES users (id)
    ) ${TABLE}`,
    down: 'DROP TABLE replies',
  },
];
