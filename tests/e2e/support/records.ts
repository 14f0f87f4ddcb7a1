import { createConnection, type Connection } from 'mariadb';
import type { Role } from '@/app/_shared/roles';
import { connectionSettings } from '@/db/connection-settings';
import { newId } from '@/db/id';
import { hashPassword } from '@/db/password';

/** Someone with an account of a test's own. */
export type Person = { readonly name: string; readonly email: string; readonly password: string; readonly role: Role };

/** A team that no other test knows. */
export type Team = {
  readonly name: string;
  readonly people: readonly Person[];
  /** The first of the role. @throws when the team was made without one: that is a fault of the test. */
  person(role: Role): Person;
};

const PASSWORD = 'tide-table-by-heart-7';
const NAMES: readonly string[] = ['Mara Quill', 'Jonas Reed', 'Petra Vale', 'Oskar Lund', 'Edda Brook', 'Samir Holt'];

/**
 * The test database itself, for what the application has no door to yet: people come into a team by invitation only,
 * and there are none. Everything else a test does through the application, as a person would.
 */
export class Records {
  private passwordHash: Promise<string> | null = null;

  private constructor(private readonly connection: Connection) {}

  static async open(): Promise<Records> {
    return new Records(await createConnection({ ...connectionSettings(process.env.DATABASE_URL), timezone: '+00:00' }));
  }

  async close(): Promise<void> {
    await this.connection.end();
  }

  /** Makes a team with a member for each role, in that order; its name and its people's addresses are used once. */
  async team(...roles: readonly Role[]): Promise<Team> {
    this.passwordHash ??= hashPassword(PASSWORD);
    const passwordHash = await this.passwordHash;
    const mark = newId().slice(0, 8).toLowerCase().replace(/[^a-z0-9]/g, 'x');
    const [teamId, now, name] = [newId(), new Date(), `Weir ${mark}`];
    await this.connection.query('INSERT INTO teams (id, name, createdAt) VALUES (?, ?, ?)', [teamId, name, now]);
    const people: Person[] = [];
    for (const [index, role] of roles.entries()) {
      const person = { name: NAMES[index % NAMES.length] ?? role, email: `${role}-${index}-${mark}@weir.example`, password: PASSWORD, role };
      const userId = newId();
      await this.connection.query(
        'INSERT INTO users (id, name, email, passwordHash, sessionVersion, createdAt) VALUES (?, ?, ?, ?, 1, ?)',
        [userId, person.name, person.email, passwordHash, now],
      );
      await this.connection.query(
        'INSERT INTO members (id, teamId, userId, role, joinedAt) VALUES (?, ?, ?, ?, ?)',
        [newId(), teamId, userId, role, now],
      );
      people.push(person);
    }
    return {
      name,
      people,
      person(role) {
        const found = people.find((person) => person.role === role);
        if (!found) throw new Error(`this team was made without a member who is ${role}`);
        return found;
      },
    };
  }

  /**
   * Forgets what this machine's address has tried: all tests come from it, and the limits on an address are those of
   * an office. The limits on accounts stand.
   */
  async forgetAddress(): Promise<void> {
    await this.connection.query(`DELETE FROM attempts WHERE subject LIKE '%:address:%'`);
  }
}
