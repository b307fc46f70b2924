import type { Request, RequestHandler } from 'express';
import passport from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Deps } from '../deps.ts';
import type { Person } from '../platform/caller.ts';
import { personById, personByPassword } from './people.ts';

/** The one place that knows passport: who is behind a session, and whether a password is right. */
export function authenticate(deps: Deps): RequestHandler[] {
  const authenticator = passportFor(deps);
  return [authenticator.initialize() as RequestHandler, authenticator.session() as RequestHandler];
}

/** The person of this e-mail and password, or null; takes as long either way. */
export function checkPassword(deps: Deps, request: Request): Promise<Person | null> {
  return new Promise((resolve, reject) => {
    passportFor(deps).authenticate(
      'local',
      { session: false },
      (error: unknown, person: Express.User | false | null | undefined) => {
        if (error) reject(error);
        else resolve(person || null);
      },
    )(request, request.res, reject);
  });
}

/** Signs in under a new session id, so that a session id from before is worth nothing. */
export function startSession(request: Request, person: Person): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logIn(person, (error: unknown) => (error ? reject(error) : resolve()));
  });
}

export function endSession(request: Request): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logOut((error: unknown) => {
      if (error) reject(error);
      else request.session.destroy((failure: unknown) => (failure ? reject(failure) : resolve()));
    });
  });
}

const passports = new WeakMap<Deps, passport.Authenticator>();

function passportFor(deps: Deps): passport.Authenticator {
  const known = passports.get(deps);
  if (known) return known;
  const made = new passport.Passport();
  made.use(
    new LocalStrategy({ usernameField: 'email', passwordField: 'password' }, (email, password, done) => {
      personByPassword(deps, email, password).then((person) => done(null, person ?? false), done);
    }),
  );
  made.serializeUser<string>((person, done) => done(null, person.id));
  made.deserializeUser<string>((id, done) => {
    personById(deps, id).then((person) => done(null, person ?? false), done);
  });
  passports.set(deps, made);
  return made;
}
