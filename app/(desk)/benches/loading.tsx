import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function BenchesLoading() {
  return (
    <PageFrame>
      <Loading what="the benches" />
    </PageFrame>
  );
}
