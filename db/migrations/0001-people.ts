import { ID, TABLE, type Migration } from './migration';

export const people: readonly Migration[] = [
  {
    name: '0001-people-1-teams',
    up: `CREATE TABLE teams (
      id ${ID} NOT NULL PRIMARY KEY,
      name VARCHAR(80) NOT NULL,
      createdAt DATETIME(3) NOT NULL
    ) ${TABLE}`,
    down: 'DROP TABLE teams',
  },
  {
    name: '0001-people-2-users',
    // An address is compared byte by byte too: an accent must not make two people one.
    up: `CREATE TABLE users (
      id ${ID} NOT NULL PRIMARY KEY,
      name VARCHAR(80) NOT NULL,
      email VARCHAR(254) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
      passwordHash VARCHAR(255) NOT NULL,
      sessionVersion INT NOT NULL DEFAULT 1,
      createdAt DATETIME(3) NOT NULL,
      UNIQUE KEY users_email (email)
    ) ${TABLE}`,
    down: 'DROP TABLE users',
  },
  {
    name: '0001-people-3-members',
    up: `CREATE TABLE members (
      id ${ID} NOT NULL PRIMARY KEY,
      teamId ${ID} NOT NULL,
      userId ${ID} NOT NULL,
      role ENUM('owner', 'designer', 'reviewer', 'viewer') NOT NULL,
      joinedAt DATETIME(3) NOT NULL,
      removedAt DATETIME(3) NULL,
      removedBy ${ID} NULL,
      UNIQUE KEY members_team_user (teamId, userId),
      KEY members_user (userId),
      CONSTRAINT members_teamId FOREIGN KEY (teamId) REFERENCES teams (id),
      CONSTRAINT members_userId FOREIGN KEY (userId) REFERENCES users (id),
      CONSTRAINT members_removedBy FOREIGN KEY (removedBy) REFERENCES users (id)
    ) ${TABLE}`,
    down: 'DROP TABLE members',
  },
  {
    name: '0001-people-4-attempts',
    up: `CREATE TABLE attempts (
      subject VARCHAR(80) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
      taken INT NOT NULL,
      endsAt DATETIME(3) NOT NULL,
      KEY attempts_endsAt (endsAt)
    ) ${TABLE}`,
    down: 'DROP TABLE attempts',
  },
];
