import type { ReactNode } from "react";
import { SignInPicture } from "@/components/brand/sign-in-picture";
import { StepwellMark } from "@/components/brand/stepwell-mark";

/** The picture left, the form right; on a narrow screen a strip of it above. */
export default function AuthLayout({ children }: { children: ReactNode }) {
  return (
    <div className="grid min-h-screen grid-rows-[max(96px,16vw)_1fr] lg:grid-cols-[1fr_520px] lg:grid-rows-1">
      <div className="relative overflow-hidden bg-hatch-ink">
        <SignInPicture className="absolute inset-x-0 bottom-0 h-full w-full max-lg:h-[98vw]" />
      </div>
      <main className="grid content-center gap-4.5 px-16 py-8 max-lg:mx-auto max-lg:w-full max-lg:max-w-[520px] max-lg:content-start max-sm:px-4">
        <p className="flex items-center gap-3 text-[1.625rem] font-bold">
          <StepwellMark className="size-8.5" />
          Stepwell
        </p>
        {children}
      </main>
    </div>
  );
}
