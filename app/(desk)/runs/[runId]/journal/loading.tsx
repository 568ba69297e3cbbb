import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function JournalLoading() {
  return (
    <PageFrame>
      <Loading what="the journal" />
    </PageFrame>
  );
}
