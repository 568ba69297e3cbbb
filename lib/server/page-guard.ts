import { cookies, headers } from "next/headers";
import { forbidden, redirect } from "next/navigation";
import { can, type Action } from "@/lib/auth/permissions";
import type { Person } from "@/lib/schemas/person";
import { getServices } from "./services";

/** The person of this request; null without a valid session. */
export async function presentPerson(): Promise<Person | null> {
  return getServices().auth.personOf((await cookies()).toString());
}

/** For server pages: the signed-in person. Redirects to sign-in (or the first-run page) without one; forbids without the permission. */
export async function requirePerson(action?: Action): Promise<Person> {
  const person = await presentPerson();
  if (!person) {
    if (await getServices().site.isEmpty()) redirect("/first-run");
    redirect(`/sign-in?next=${encodeURIComponent(await presentPath())}`);
  }
  if (action && !can(person, action)) forbidden();
  return person;
}

/** Path and query of this request, as server.ts tells it. */
async function presentPath(): Promise<string> {
  return (await headers()).get("x-stepwell-path") ?? "/benches";
}
