import type { RequestHandler } from 'express';
import session from 'express-session';
import { Passport } from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { SessionTable } from '../db/sessions.js';
import type { UserTable } from '../db/users.js';
import type { Passwords } from '../passwords.js';

const TWO_WEEKS_MS = 14 * 24 * 60 * 60 * 1000;
export const SESSION_COOKIE = 'motebook';

/** Sessions in the database, and passport that restores who is signed in. */
export function sessions(options: {
  store: SessionTable;
  users: UserTable;
  passwords: Passwords;
  secret: string;
  secure: boolean;
}): { handlers: RequestHandler[]; passport: InstanceType<typeof Passport> } {
  const { store, users, passwords, secret, secure } = options;
  const passport = new Passport();
  passport.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      void (async () => {
        const user = await users.findByEmail(email);
        return (await passwords.matches(password, user?.passwordHash ?? null)) ? user : null;
      })().then((user) => {
        done(null, user ?? false);
      }, done);
    }),
  );
  passport.serializeUser((user, done) => {
    done(null, user.id);
  });
  passport.deserializeUser((id: string, done) => {
    users.find(id).then((user) => {
      done(null, user ?? false);
    }, done);
  });
  return {
    passport,
    handlers: [
      session({
        name: SESSION_COOKIE,
        secret,
        store,
        resave: false,
        saveUninitialized: false,
        cookie: { httpOnly: true, sameSite: 'lax', secure, maxAge: TWO_WEEKS_MS },
      }),
      passport.session() as RequestHandler,
    ],
  };
}
