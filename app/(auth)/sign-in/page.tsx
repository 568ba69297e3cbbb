import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { demoAccounts } from "@/components/auth/demo-accounts";
import { safeNext } from "@/components/auth/safe-next";
import { SignInForm } from "@/components/auth/sign-in-form";
import { presentPerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export const metadata: Metadata = { title: "Sign in" };

interface SignInPageProps {
  searchParams: Promise<{ next?: string | string[] }>;
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  const next = safeNext((await searchParams).next);
  if (await presentPerson()) redirect(next);
  const { site, repositories } = getServices();
  if (await site.isEmpty()) redirect("/first-run");
  const demo = site.isDemo ? demoAccounts(await repositories.people.list()) : [];
  return (
    <>
      <h1 className="sr-only">Sign in</h1>
      <p className="text-[1rem] text-ink-2">
        Runs resistance sweeps by itself, waits until the reading is still, and shows how each point stands against its
        limit.
      </p>
      <SignInForm next={next} demo={demo} />
    </>
  );
}
