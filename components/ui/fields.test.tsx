import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Checkbox } from "./checkbox";
import { NumberField, SelectField, TextField } from "./fields";
import { FigureList } from "./figure-list";
import { Progress } from "./progress";
import { RadioGroup } from "./radio-group";
import { Table } from "./table";

/** The value of an attribute of the first element of a kind. */
function attribute(markup: string, element: string, name: string): string | null {
  const tag = new RegExp(`<${element}\\b[^>]*>`).exec(markup)?.[0] ?? "";
  return new RegExp(`\\s${name}="([^"]*)"`).exec(tag)?.[1] ?? null;
}

/** The ids an element names in an attribute, each of which must stand in the markup. */
function describedBy(markup: string, element: string): string[] {
  const ids = (attribute(markup, element, "aria-describedby") ?? "").split(" ").filter(Boolean);
  for (const id of ids) expect(markup).toContain(` id="${id}"`);
  return ids;
}

describe("a field", () => {
  it("ties label, hint and error to its control, where the error summary leads", () => {
    const markup = renderToStaticMarkup(
      <TextField name="email" label="E-mail" hint="For the sign-in" error="Enter an e-mail address" />,
    );
    expect(attribute(markup, "label", "for")).toBe("field-email");
    expect(attribute(markup, "input", "id")).toBe("field-email");
    expect(attribute(markup, "input", "name")).toBe("email");
    expect(attribute(markup, "input", "aria-invalid")).toBe("true");
    expect(describedBy(markup, "input")).toHaveLength(2);
  });

  it("names nothing that is not there", () => {
    const markup = renderToStaticMarkup(<TextField name="email" label="E-mail" />);
    expect(attribute(markup, "input", "aria-describedby")).toBeNull();
    expect(attribute(markup, "input", "aria-invalid")).toBeNull();
  });

  it("says its unit with its hint, and lets a decimal comma be typed", () => {
    const markup = renderToStaticMarkup(
      <NumberField name="weight" label="Weight" unit="kg" hint="With gear" defaultValue="84,5" />,
    );
    expect(attribute(markup, "input", "type")).toBe("text");
    expect(attribute(markup, "input", "inputMode")).toBe("decimal");
    expect(attribute(markup, "input", "value")).toBe("84,5");
    expect(describedBy(markup, "input")).toHaveLength(2);
  });

  it("keeps what was chosen when the form comes back", () => {
    const options = [
      { value: "a", label: "Aldervane 850" },
      { value: "b", label: "Morrowkeel 45" },
    ];
    const select = renderToStaticMarkup(
      <SelectField name="wing" label="Front wing" empty="Any" options={options} defaultValue="b" />,
    );
    expect(select).toMatch(/<option[^>]*value="b"[^>]*selected=""/);
    const radios = renderToStaticMarkup(
      <RadioGroup name="wing" legend="Front wing" options={options} defaultValue="b" error="Choose one" />,
    );
    expect(radios).toMatch(/id="field-wing-b"[^>]*checked=""/);
    expect(attribute(radios, "fieldset", "id")).toBe("field-wing");
    expect(describedBy(radios, "fieldset")).toHaveLength(1);
    const box = renderToStaticMarkup(<Checkbox name="keep" label="Keep" hint="Here only" defaultChecked />);
    expect(box).toContain('checked=""');
    expect(describedBy(box, "input")).toHaveLength(1);
  });
});

describe("figures and tables", () => {
  it("give a missing figure a dash with its reason and never a zero", () => {
    const markup = renderToStaticMarkup(
      <FigureList figures={[{ label: "Best hour", value: null, unit: "kn", note: "too short" }]} />,
    );
    expect(markup).toContain("–");
    expect(markup).toContain("none: too short");
    expect(markup).not.toContain("kn");
  });

  it("name the scroller of a table by its caption and let the keyboard in", () => {
    const markup = renderToStaticMarkup(
      <Table caption="On-foil segments">
        <tbody />
      </Table>,
    );
    expect(attribute(markup, "div", "role")).toBe("region");
    expect(attribute(markup, "div", "tabindex")).toBe("0");
    expect(attribute(markup, "caption", "id")).toBe(attribute(markup, "div", "aria-labelledby"));
  });

  it("bound a progress and say when its end is not known", () => {
    const past = renderToStaticMarkup(<Progress label="Uploading" share={1.7} />);
    expect(attribute(past, "div", "aria-valuenow")).toBe("100");
    const open = renderToStaticMarkup(<Progress label="Uploading" share={null} />);
    expect(attribute(open, "div", "aria-valuenow")).toBeNull();
    expect(attribute(open, "div", "aria-valuetext")).toBe("working");
  });
});
