import Link from "next/link";

export default function Forbidden() {
  return (
    <main className="mx-auto max-w-xl p-8">
      <h1 className="text-2xl font-semibold">Your role does not open this page</h1>
      <p className="mt-2">Ask whoever looks after Stepwell for the role that does, or go back to what is yours.</p>
      <p className="mt-4">
        <Link href="/benches">To the benches</Link>
      </p>
    </main>
  );
}
