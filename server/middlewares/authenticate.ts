import connectPgSimple from 'connect-pg-simple';
import type { Request, RequestHandler, Response } from 'express';
import session from 'express-session';
import passport from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Pool } from 'pg';
import { z } from 'zod';
import type { Config } from '#server/config/config.ts';
import { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';

/** A session ends after a working day without a request … */
const IDLE_MS = 8 * 60 * 60 * 1000;
/** … and after a week whatever happens. */
const ABSOLUTE_MS = 7 * 24 * 60 * 60 * 1000;
const PRUNE_SECONDS = 15 * 60;

/** What a session keeps of the person: see `Person.sessionEpoch`. */
const sessionUser = z.object({
  personId: z.uuid(),
  epoch: z.int(),
  since: z.int(),
});

/** Says who it is, or null when address and password do not belong together. */
export type VerifyCredentials = (email: string, password: string) => Promise<Person | null>;

export interface Authentication {
  /** Finds the session and the person of each request. */
  readonly handlers: readonly RequestHandler[];
  /** Ends the timers of the session store. */
  readonly close: () => void;
}

/** Sessions in PostgreSQL, people by passport. @param pool of the run-time role; the table is `sessions` */
export function authentication(
  config: Config,
  pool: Pool,
  verifyCredentials: VerifyCredentials,
): Authentication {
  const PgStore = connectPgSimple(session);
  const store = new PgStore({
    pool,
    tableName: 'sessions',
    createTableIfMissing: false,
    pruneSessionInterval: PRUNE_SECONDS,
  });
  usePassport(verifyCredentials);
  return {
    handlers: [
      session({
        ...sessionCookie(config),
        store,
        secret: config.sessionSecret,
        resave: false,
        saveUninitialized: false,
        rolling: true,
      }),
      passport.session(),
    ],
    close: () => {
      store.close();
    },
  };
}

/** With TLS the name's prefix makes browsers refuse the cookie from anywhere but this very host. */
function sessionCookie(config: Config): Pick<session.SessionOptions, 'name' | 'cookie'> {
  const secure = config.publicUrl.startsWith('https:');
  return {
    name: secure ? '__Host-ringstead.sid' : 'ringstead.sid',
    cookie: { httpOnly: true, sameSite: 'lax', secure, path: '/', maxAge: IDLE_MS },
  };
}

function usePassport(verifyCredentials: VerifyCredentials): void {
  passport.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      verifyCredentials(email, password).then(
        (person) => {
          done(null, person ?? false);
        },
        (error: unknown) => {
          done(error);
        },
      );
    }),
  );
  passport.serializeUser((user, done) => {
    const person = user as Person;
    done(null, { personId: person.id, epoch: person.sessionEpoch, since: Date.now() });
  });
  passport.deserializeUser((stored: unknown, done) => {
    personOfSession(stored).then(
      (person) => {
        done(null, person ?? false);
      },
      (error: unknown) => {
        done(error);
      },
    );
  });
}

/** Null ends the session: too old, of an earlier epoch, or of somebody deactivated. */
async function personOfSession(stored: unknown): Promise<Person | null> {
  const parsed = sessionUser.safeParse(stored);
  if (!parsed.success || Date.now() - parsed.data.since > ABSOLUTE_MS) return null;
  const person = await Person.findByPk(parsed.data.personId, {
    include: { model: Team, as: 'team' },
  });
  return person?.active && person.sessionEpoch === parsed.data.epoch ? person : null;
}

/** Checks address and password in the request's body by passport's local strategy. */
export function checkPassword(request: Request, response: Response): Promise<Person | null> {
  return new Promise((resolve, reject) => {
    const done = (error: unknown, user: unknown) => {
      if (error)
        reject(error instanceof Error ? error : new Error('The password was not checked.'));
      else resolve(user instanceof Person ? user : null);
    };
    const strategy = passport.authenticate('local', done) as RequestHandler;
    void strategy(request, response, reject);
  });
}

/** Begins a session of the person under a new id; the data of the earlier one are dropped. */
export function beginSession(request: Request, person: Person): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logIn(person, (error: unknown) => {
      if (error) reject(error instanceof Error ? error : new Error('The session did not begin.'));
      else resolve();
    });
  });
}

/** Ends the request's session, in the database too. */
export function endSession(request: Request): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logOut((error: unknown) => {
      if (error) reject(error instanceof Error ? error : new Error('The session did not end.'));
      else resolve();
    });
  });
}
