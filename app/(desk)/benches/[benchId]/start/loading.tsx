import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function StartLoading() {
  return (
    <PageFrame>
      <div className="mx-auto w-full max-w-[1130px]">
        <Loading what="the bench, its units and recipes" />
      </div>
    </PageFrame>
  );
}
