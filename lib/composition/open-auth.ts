import { Passwords } from "@/lib/auth/passwords";
import { loadSessionSecret } from "@/lib/auth/session-secret";
import { Sessions } from "@/lib/auth/sessions";
import { SignInDesk } from "@/lib/auth/sign-in";
import type { Repositories } from "@/lib/data/repositories";
import type { Config } from "@/lib/server/config";
import type { AuthServices, SiteServices } from "@/lib/server/services";

export interface OpenedAuth {
  passwords: Passwords;
  sessions: Sessions;
  auth: AuthServices;
}

/** Passwords, sessions and sign-in of one data folder. */
export function openAuth(repositories: Repositories, config: Config): OpenedAuth {
  const passwords = new Passwords();
  const secret = loadSessionSecret(config.dataFolder, config.sessionSecret);
  const sessions = new Sessions(repositories, { secret, secureCookies: config.secureCookies, nowMs: Date.now });
  const desk = new SignInDesk(repositories.people, passwords, sessions);
  const auth: AuthServices = {
    signIn: (form, address) => desk.signIn(form, address),
    signOut: (cookieHeader) => sessions.end(cookieHeader),
    personOf: async (cookieHeader) => (await sessions.find(cookieHeader))?.person ?? null,
  };
  return { passwords, sessions, auth };
}

/** The site's name, and its first administrator. */
export function openSite(
  repositories: Repositories,
  { passwords, sessions }: OpenedAuth,
  isDemo: boolean,
): SiteServices {
  const { people, siteSettings } = repositories;
  return {
    isDemo,
    describe: async () => ({
      name: (await siteSettings.get("site.name")) ?? "Stepwell",
      place: (await siteSettings.get("site.place")) ?? "",
    }),
    isEmpty: async () => (await people.count()) === 0,
    setUp: async ({ siteName, name, email, password }) => {
      await siteSettings.set("site.name", siteName);
      const draft = { name, email, roles: ["administrator" as const], active: true };
      const administrator = await people.create(draft, await passwords.hash(password));
      return { cookie: await sessions.begin(administrator.id) };
    },
  };
}
