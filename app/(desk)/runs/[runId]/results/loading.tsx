import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function ResultsLoading() {
  return (
    <PageFrame>
      <Loading what="the results" />
    </PageFrame>
  );
}
