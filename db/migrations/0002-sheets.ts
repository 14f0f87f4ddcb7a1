import { HASH, ID, TABLE, type Migration } from './migration';

export const sheets: readonly Migration[] = [
  {
    name: '0002-sheets-1-sheets',
    // The origin is no foreign key: it is what the clone remembers, and stands whatever becomes of the other sheet.
    up: `CREATE TABLE sheets (
      id ${ID} NOT NULL PRIMARY KEY,
      teamId ${ID} NOT NULL,
      name VARCHAR(120) NOT NULL,
      document LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
      documentHash ${HASH} NOT NULL,
      purpose VARCHAR(2000) NOT NULL,
      partCount INT NOT NULL,
      revision INT NOT NULL DEFAULT 1,
      createdAt DATETIME(3) NOT NULL,
      createdBy ${ID} NOT NULL,
      changedAt DATETIME(3) NOT NULL,
      changedBy ${ID} NOT NULL,
      archivedAt DATETIME(3) NULL,
      archivedBy ${ID} NULL,
      originSheetId ${ID} NULL,
      originSheetName VARCHAR(120) NULL,
      originSnapshotId ${ID} NULL,
      originSnapshotName VARCHAR(120) NULL,
      originRevision INT NULL,
      lastSnapshotNumber INT NOT NULL DEFAULT 0,
      lastNoteNumber INT NOT NULL DEFAULT 0,
      notesVersion INT NOT NULL DEFAULT 0,
      KEY sheets_team_changed (teamId, changedAt),
      CONSTRAINT sheets_teamId FOREIGN KEY (teamId) REFERENCES teams (id),
      CONSTRAINT sheets_createdBy FOREIGN KEY (createdBy) REFERENCES users (id),
      CONSTRAINT sheets_changedBy FOREIGN KEY (changedBy) REFERENCES users (id),
      CONSTRAINT sheets_archivedBy FOREIGN KEY (archivedBy) REFERENCES users (id)
    ) ${TABLE}`,
    down: 'DROP TABLE sheets',
  },
  {
    name: '0002-sheets-2-snapshots',
    up: `CREATE TABLE snapshots (
      id ${ID} NOT NULL PRIMARY KEY,
      sheetId ${ID} NOT NULL,
      number INT NOT NULL,
      name VARCHAR(120) NOT NULL,
      document LONGTEXT CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
      documentHash ${HASH} NOT NULL,
      revision INT NOT NULL,
      takenAt DATETIME(3) NOT NULL,
      takenBy ${ID} NOT NULL,
      UNIQUE KEY snapshots_sheet_number (sheetId, number),
      CONSTRAINT snapshots_sheetId FOREIGN KEY (sheetId) REFERENCES sheets (id),
      CONSTRAINT snapshots_takenBy FOREIGN KEY (takenBy) REFERENCES users (id)
    ) ${TABLE}`,
    down: 'DROP TABLE snapshots',
  },
];
