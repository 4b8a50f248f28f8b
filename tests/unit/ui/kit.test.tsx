/** What a screen reader and a keyboard rely on in the kit, read from the markup that the server sends. */
import { renderToStaticMarkup as render } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { DataTable } from "@/components/ui/data-table";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { StockWell } from "@/components/ui/stock-well";
import { TextField } from "@/components/ui/text-field";

const attribute = (html: string, tag: string, name: string): string | undefined =>
  new RegExp(`<${tag}\\b[^>]*?\\s${name}="([^"]*)"`).exec(html)?.[1];

describe("a text field", () => {
  test("is named by its label", () => {
    const html = render(<TextField label="Name" />);
    expect(attribute(html, "label", "for")).toBe(attribute(html, "input", "id"));
    expect(attribute(html, "input", "aria-invalid")).toBeUndefined();
    expect(attribute(html, "input", "aria-describedby")).toBeUndefined();
  });

  test("is described by its hint and its error, and marked as wrong", () => {
    const html = render(
      <TextField id="step" label="Step" hint="In grams." error="Read it again." />,
    );
    expect(attribute(html, "input", "aria-describedby")).toBe("step-hint step-error");
    expect(attribute(html, "input", "aria-invalid")).toBe("true");
    expect(html).toMatch(/<p id="step-hint"[^>]*>In grams\.<\/p>/);
    expect(html).toMatch(/<p id="step-error"[^>]*>Read it again\.<\/p>/);
  });
});

test("a select offers its placeholder as an empty answer", () => {
  const html = render(
    <SelectField
      label="Scale"
      placeholder="Choose a scale"
      options={[{ value: "1", label: "Bench" }]}
    />,
  );
  expect(html).toContain(
    '<option value="">Choose a scale</option><option value="1">Bench</option>',
  );
});

describe("choice tiles", () => {
  const choices = [
    { value: "clean", label: "Clean" },
    { value: "wet", label: "Wet" },
  ];

  test("are radio buttons of one name in a named group", () => {
    const html = render(<ChoiceTiles legend="Condition" name="condition" choices={choices} />);
    expect(html).toMatch(/<fieldset[^>]*><legend[^>]*>Condition<\/legend>/);
    expect(html.match(/type="radio"[^>]*name="condition"/g)).toHaveLength(2);
    expect(html).not.toContain("checked=");
  });

  test("show the chosen one", () => {
    const html = render(
      <ChoiceTiles
        legend="Condition"
        name="condition"
        choices={choices}
        value="wet"
        onChoose={() => undefined}
      />,
    );
    expect(html.match(/checked=""/g)).toHaveLength(1);
    expect(html).toMatch(/value="wet"[^>]*checked=""|checked=""[^>]*value="wet"/);
  });
});

test("a busy button keeps its focus and says that it works", () => {
  const html = render(<Button busy>Save 2.160 kg</Button>);
  expect(html).toContain('aria-busy="true"');
  expect(html).toContain('aria-disabled="true"');
  expect(html).not.toMatch(/\sdisabled=/);
});

test("a notice never says it by colour alone", () => {
  for (const [tone, word] of [
    ["ok", "Done"],
    ["warn", "Check"],
    ["bad", "Refused"],
    ["info", "Note"],
  ] as const) {
    expect(render(<Notice tone={tone}>Text</Notice>)).toContain(`>${word}</strong>`);
  }
});

describe("a table", () => {
  type Row = { name: string; kg: string };
  const rows: Row[] = [
    { name: "Library", kg: "2.16" },
    { name: "Market", kg: "11" },
  ];
  const html = render(
    <DataTable
      caption="By point"
      rows={rows}
      rowKey={(row) => row.name}
      columns={[
        { key: "name", header: "Point", head: true, cell: (row: Row) => row.name, footer: "Total" },
        { key: "kg", header: "kg", align: "figure", cell: (row: Row) => row.kg, footer: "13.160" },
      ]}
    />,
  );

  test("keeps its roles, which a block layout would take away", () => {
    expect(html.match(/role="row"/g)).toHaveLength(4);
    expect(html.match(/role="columnheader"/g)).toHaveLength(2);
    expect(html.match(/role="rowheader"/g)).toHaveLength(2);
    expect(html).toContain("<caption");
  });

  test("puts unseen digits behind short figures and none behind full ones", () => {
    expect(html).toMatch(/2\.16<span aria-hidden="true" class="invisible[^"]*">0<\/span>/);
    expect(html).toMatch(/11<span aria-hidden="true" class="invisible[^"]*">\.000<\/span>/);
    expect(html).not.toMatch(/13\.160<span/);
  });

  test("without rows shows what is said instead", () => {
    const none = render(
      <DataTable
        caption="By point"
        rows={[]}
        rowKey={() => ""}
        columns={[]}
        empty={<p>No bag yet</p>}
      />,
    );
    expect(none).toBe("<p>No bag yet</p>");
  });
});

describe("a stock well", () => {
  test("is filled in proportion and says its content in words", () => {
    const html = render(
      <StockWell label="HDPE, blue: 5.79 kg" kg="5.79" fill={0.25} reserved={0.5} hex="#1f46d6" />,
    );
    expect(html).toContain("HDPE, blue: 5.79 kg");
    expect(html).toContain("height:max(3px, 25.00%)");
    expect(html).toContain("height:50.00%");
  });

  test("with nothing in it is an outline that still has its words", () => {
    const html = render(<StockWell label="HDPE, pink: none" kg={null} fill={0} />);
    expect(html).toContain("border-dashed");
    expect(html).toContain("HDPE, pink: none");
    expect(html).not.toContain("<svg");
  });
});
