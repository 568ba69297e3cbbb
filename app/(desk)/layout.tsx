import { cookies } from "next/headers";
import type { ReactNode } from "react";
import { DeskBar } from "@/components/run-views/desk-bar";
import { THEME_COOKIE, themeFrom } from "@/components/shell/theme";
import { DeskProviders } from "@/lib/client/desk-providers";
import { requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export default async function DeskLayout({ children }: { children: ReactNode }) {
  const person = await requirePerson();
  const { name, place } = await getServices().site.describe();
  const theme = themeFrom((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <DeskProviders>
      <DeskBar
        siteName={[name, place].filter(Boolean).join(" · ")}
        person={{ name: person.name, roles: person.roles }}
        theme={theme}
      />
      <div id="content" tabIndex={-1} className="outline-none">
        {children}
      </div>
    </DeskProviders>
  );
}
