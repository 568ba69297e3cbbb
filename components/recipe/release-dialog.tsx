import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";

interface ReleaseDialogProps {
  isOpen: boolean;
  onClose: () => void;
  onRelease: () => void;
  isBusy: boolean;
  name: string;
  version: number;
}

/** Says what a release means, and takes it. */
export function ReleaseDialog({ isOpen, onClose, onRelease, isBusy, name, version }: ReleaseDialogProps) {
  const earlier = version > 1 ? ` Technicians are then offered it instead of version ${version - 1}.` : "";
  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={`Release version ${version} of “${name}”`}
      description={`Runs can be started with it from now on.${earlier} A released version never changes: an edit begins the next one. Runs that are under way keep the version they began with.`}
      actions={
        <>
          <Button onClick={onClose}>Not yet</Button>
          <Button variant="main" onClick={onRelease} busy={isBusy}>
            Release version {version}
          </Button>
        </>
      }
    />
  );
}
