import { PageFrame } from "@/components/run-views/page-frame";
import { Loading } from "@/components/ui/loading";

export default function RecipesLoading() {
  return (
    <PageFrame>
      <Loading what="recipes" />
    </PageFrame>
  );
}
