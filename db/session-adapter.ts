import { createHash } from 'node:crypto';
import { Mysql2Adapter } from '@lucia-auth/adapter-mysql';
import type { Adapter, DatabaseSession, DatabaseUser } from 'lucia';
import { QueryTypes } from 'sequelize';
import { database } from './connection';

/** A session's id as stored: SHA-256 of the cookie's value, so that a stolen table opens nothing. */
export function storedSessionId(sessionId: string): string {
  return createHash('sha256').update(sessionId).digest('hex');
}

const connection = {
  query: async (sql: string, values: unknown[]): Promise<[unknown]> => [
    await database().query(sql, { type: QueryTypes.SELECT, replacements: values }),
  ],
  execute: async (sql: string, values: unknown[]): Promise<[unknown]> => [await database().query(sql, { replacements: values })],
};

function hashedAdapter(): Adapter {
  const inner = new Mysql2Adapter(connection as never, { user: 'accounts', session: 'sessions' });
  const open = (session: DatabaseSession, sessionId: string): DatabaseSession => ({
    ...session,
    id: sessionId,
    expiresAt: new Date(session.expiresAt),
  });
  return {
    getSessionAndUser: async (sessionId): Promise<[DatabaseSession | null, DatabaseUser | null]> => {
      const [session, user] = await inner.getSessionAndUser(storedSessionId(sessionId));
      return [session && open(session, sessionId), user];
    },
    getUserSessions: (userId) => inner.getUserSessions(userId),
    setSession: (session) => inner.setSession({ ...session, id: storedSessionId(session.id) }),
    updateSessionExpiration: (sessionId, expiresAt) => inner.updateSessionExpiration(storedSessionId(sessionId), expiresAt),
    deleteSession: (sessionId) => inner.deleteSession(storedSessionId(sessionId)),
    deleteUserSessions: (userId) => inner.deleteUserSessions(userId),
    deleteExpiredSessions: () => inner.deleteExpiredSessions(),
  };
}

/** lucia's store on our pool, with ids hashed at rest. */
export const sessionAdapter: Adapter = hashedAdapter();
