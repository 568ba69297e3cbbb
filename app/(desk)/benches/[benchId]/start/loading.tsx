import { Loading } from "@/components/ui/loading";

export default function StartLoading() {
  return (
    <main className="mx-auto w-full max-w-[1180px] px-6 pt-5 pb-6 max-sm:px-4">
      <Loading what="the bench, its units and recipes" />
    </main>
  );
}
