import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/controls";
import { TableHead } from "@/components/ui/data-table";
import { Facts } from "@/components/ui/facts";
import { Field } from "@/components/ui/field";
import { Pagination } from "@/components/ui/pagination";
import { Segmented } from "@/components/ui/segmented";

describe("Field", () => {
  it("gives its control the label, the error and the hint", () => {
    const html = renderToStaticMarkup(
      <Field label="E-mail" hint="Work address" error="Enter an address.">
        <TextInput id="email" />
      </Field>,
    );
    expect(html).toContain('for="email"');
    expect(html).toMatch(
      /<input[^>]*id="email"[^>]*aria-describedby="email-error email-hint"[^>]*aria-invalid="true"/u,
    );
    expect(html).toMatch(/<p id="email-error" role="alert"[^>]*>Enter an address\./u);
  });

  it("says nothing of an error that is not there", () => {
    const html = renderToStaticMarkup(
      <Field label="Name">
        <TextInput />
      </Field>,
    );
    expect(html).not.toMatch(/aria-invalid=|aria-describedby=|role="alert"/u);
  });
});

describe("Button", () => {
  it("is a link where it has an address, else a button that submits nothing by accident", () => {
    expect(renderToStaticMarkup(<Button href="/runs">Runs</Button>)).toMatch(/^<a [^>]*href="\/runs"/u);
    expect(renderToStaticMarkup(<Button>Hold</Button>)).toMatch(/^<button type="button"/u);
  });

  it("takes no second press while busy", () => {
    expect(renderToStaticMarkup(<Button busy>Stop</Button>)).toMatch(/disabled="" aria-busy="true"/u);
  });
});

describe("TableHead", () => {
  const columns = [
    { id: "number", label: "Run", sortable: true },
    { id: "unit", label: "Unit", sortable: true },
    { id: "stairs", label: "Points" },
  ] as const;
  const head = (direction: "rising" | "falling") =>
    renderToStaticMarkup(
      <table>
        <TableHead
          columns={columns}
          sort={{ column: "number", direction }}
          hrefFor={(sort) => `/runs?sort=${sort.column}&direction=${sort.direction}`}
        />
      </table>,
    );

  it("tells the order by aria-sort and gives none to a column that does not sort", () => {
    expect(head("rising").match(/aria-sort="\w+"/gu)).toEqual(['aria-sort="ascending"', 'aria-sort="none"']);
    expect(head("falling")).toContain('aria-sort="descending"');
  });

  it("turns the order at a second press and begins another column rising", () => {
    expect(head("rising")).toContain("sort=number&amp;direction=falling");
    expect(head("falling")).toContain("sort=number&amp;direction=rising");
    expect(head("falling")).toContain("sort=unit&amp;direction=rising");
  });
});

describe("Segmented", () => {
  const segments = [
    { value: "a", label: "Point" },
    { value: "b", label: "Run" },
  ] as const;

  it("tells which one is on without colour", () => {
    const html = renderToStaticMarkup(<Segmented label="View" value="b" segments={segments} />);
    expect(html).toMatch(/aria-pressed="false"[^>]*>Point.*aria-pressed="true"[^>]*>Run/u);
    const links = segments.map((segment) => ({ ...segment, href: `/${segment.value}` }));
    expect(renderToStaticMarkup(<Segmented label="View" value="a" segments={links} />)).toMatch(
      /<nav aria-label="View".*aria-current="page"[^>]*href="\/a"|href="\/a"[^>]*aria-current="page"/u,
    );
  });
});

describe("Pagination", () => {
  it("offers no page before the first and none after the last", () => {
    const html = renderToStaticMarkup(
      <Pagination page={1} pages={2} summary="Runs 1 to 20 of 30" hrefFor={(page) => `/runs?page=${page}`} />,
    );
    expect(html).toMatch(/<button[^>]*disabled=""[^>]*>Before/u);
    expect(html).toContain("/runs?page=2");
  });
});

describe("Breadcrumb and Facts", () => {
  it("links what has an address and says the rest", () => {
    const html = renderToStaticMarkup(<Breadcrumb crumbs={[{ label: "Runs", href: "/runs" }, { label: "Run 213" }]} />);
    expect(html).toMatch(/<a[^>]*href="\/runs"[^>]*>Runs<\/a>/u);
    expect(html).toContain("<span>Run 213</span>");
  });

  it("leaves out what has no value", () => {
    const html = renderToStaticMarkup(
      <Facts
        facts={[
          { term: "Room", value: "23 °C" },
          { term: "Left", value: null },
        ]}
      />,
    );
    expect(html).toContain("Room");
    expect(html).not.toContain("Left");
  });
});
