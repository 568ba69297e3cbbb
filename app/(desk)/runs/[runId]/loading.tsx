import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function RunLoading() {
  return (
    <PageFrame>
      <Loading what="the run" />
    </PageFrame>
  );
}
