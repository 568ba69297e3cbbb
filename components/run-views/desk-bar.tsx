"use client";

import { useState } from "react";
import { TopBar, type TopBarProps } from "@/components/shell/top-bar";
import { Note } from "@/components/ui/note";
import { api } from "@/lib/client/api";
import { failureMessage } from "@/lib/client/api-error";

/** The bar of the signed-in pages; it can end the session. */
export function DeskBar(props: Omit<TopBarProps, "onSignOut" | "isSigningOut">) {
  const [isSigningOut, setIsSigningOut] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const signOut = async () => {
    setIsSigningOut(true);
    setFailure(null);
    try {
      await api.signOut();
      // A whole new page, so that the live connection ends with the session.
      // eslint-disable-next-line @next/next/no-location-assign-relative-destination
      window.location.assign("/sign-in");
    } catch (error) {
      setFailure(failureMessage(error));
      setIsSigningOut(false);
    }
  };
  return (
    <>
      <TopBar {...props} onSignOut={() => void signOut()} isSigningOut={isSigningOut} />
      {failure && (
        <Note tone="bad" alert title="Still signed in.">
          {failure}
        </Note>
      )}
    </>
  );
}
