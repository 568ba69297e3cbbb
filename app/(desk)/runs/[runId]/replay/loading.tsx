import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function ReplayLoading() {
  return (
    <PageFrame>
      <Loading what="the replay" />
    </PageFrame>
  );
}
