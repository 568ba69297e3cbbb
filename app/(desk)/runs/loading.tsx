import { Loading } from "@/components/ui/loading";

export default function RunsLoading() {
  return (
    <main className="mx-auto w-full max-w-[1600px] px-6 pt-5 pb-6 max-sm:px-4">
      <h1>Runs</h1>
      <Loading what="runs" />
    </main>
  );
}
