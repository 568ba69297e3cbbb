import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { FirstRunForm } from "@/components/auth/first-run-form";
import { getServices } from "@/lib/server/services";

export const metadata: Metadata = { title: "First run" };
export const dynamic = "force-dynamic";

export default async function FirstRunPage() {
  if (!(await getServices().site.isEmpty())) redirect("/sign-in");
  return (
    <>
      <h1>Set up this site</h1>
      <p className="text-ink-2">
        Nobody is registered here yet. Name the site and make its administrator; everyone else is added afterwards.
      </p>
      <FirstRunForm />
    </>
  );
}
