import type { Sequelize } from 'sequelize';
import { database } from '../client';
import { initMember, Member } from './member';
import { initNote, Note } from './note';
import { initReply, Reply } from './reply';
import { initSheet, Sheet } from './sheet';
import { initSnapshot, Snapshot } from './snapshot';
import { initTeam, Team } from './team';
import { initUser, User } from './user';

const classes = { Member, Note, Reply, Sheet, Snapshot, Team, User };

let boundTo: Sequelize | undefined;

/**
 * The models, bound to this process's pool. Bound at first use and not at import, since the build imports this file
 * without a database; and by each copy of this module for itself, since each bundle has its own classes.
 */
export function models(): typeof classes {
  const sequelize = database();
  if (boundTo !== sequelize) {
    for (const init of [initTeam, initUser, initMember, initSheet, initSnapshot, initNote, initReply]) init(sequelize);
    boundTo = sequelize;
  }
  return classes;
}
