import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function RunsLoading() {
  return (
    <PageFrame>
      <h1>Runs</h1>
      <Loading what="runs" />
    </PageFrame>
  );
}
