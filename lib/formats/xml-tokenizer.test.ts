import fc from "fast-check";
import { SaxesParser } from "saxes";
import { describe, expect, it } from "vitest";
import { DEFAULT_READ_LIMITS } from "./read-limits";
import { XmlTokenizer, type TagHandler } from "./xml-tokenizer";

/** What happened, with neighbouring texts joined. */
class Record_ implements TagHandler {
  readonly wantsText = true;
  readonly events: string[] = [];
  private pending = "";

  codeOf(): number {
    return 0;
  }

  open(name: { qualified: string }, attributes: readonly string[]): void {
    this.flush();
    this.events.push(`<${name.qualified} ${JSON.stringify(attributes)}`);
  }

  text(text: string): void {
    this.pending += text;
  }

  close(name: { qualified: string }): void {
    this.flush();
    this.events.push(`>${name.qualified}`);
  }

  private flush(): void {
    if (this.pending !== "") this.events.push(`"${this.pending}`);
    this.pending = "";
  }
}

function ours(text: string, cut: number): string[] {
  const record = new Record_();
  const tokenizer = new XmlTokenizer(record, DEFAULT_READ_LIMITS);
  for (let at = 0; at < text.length; at += cut) tokenizer.write(text.slice(at, at + cut));
  expect(tokenizer.end()).toBe(true);
  return record.events;
}

function theirs(text: string): string[] {
  const record = new Record_();
  const parser = new SaxesParser({ xmlns: false });
  parser.on("opentag", (tag) => record.open({ qualified: tag.name }, Object.entries(tag.attributes).flat()));
  parser.on("text", (part) => record.text(part));
  parser.on("cdata", (part) => record.text(part));
  parser.on("closetag", (tag) => record.close({ qualified: tag.name }));
  parser.write(text).close();
  return record.events;
}

const name = fc.constantFrom("a", "b:c", "trkpt", "_x", "é", "gpxtpx:hr");
const text = fc
  .string({ unit: fc.constantFrom("x", "é", " ", "\n", "&amp;", "&#233;", "&lt;", "☀", "]", "-", ">") })
  // "]]>" may not stand in text (XML 1.0, production 14).
  .map((value) => value.replaceAll("]]>", ""));
const attributes = fc
  .uniqueArray(fc.constantFrom("lat", "lon", "xmlns:q", "é"), { maxLength: 3 })
  .chain((names) =>
    fc.tuple(...names.map((key) => text.map((value) => ` ${key} = "${value.replaceAll("\n", "")}"`))),
  )
  .map((parts) => parts.join(""));
const { tree } = fc.letrec<{ tree: string; inner: string }>((tie) => ({
  inner: fc.oneof(
    { depthSize: "small" },
    text,
    fc.constantFrom("<!-- a <b> -->", "<?p q?>", "<![CDATA[<&]]]]>", "<!---->"),
    tie("tree"),
  ),
  tree: fc
    .tuple(name, attributes, fc.array(tie("inner"), { maxLength: 4 }), fc.boolean())
    .map(([tag, attrs, inner, space]) =>
      inner.length === 0
        ? `<${tag}${attrs}/>`
        : `<${tag}${attrs}>${inner.join("")}</${tag}${space ? " " : ""}>`,
    ),
}));

describe("XmlTokenizer", () => {
  it("hears the same tags, attributes and texts as saxes, wherever the text is cut", () => {
    fc.assert(
      fc.property(tree, fc.integer({ min: 1, max: 40 }), (document, cut) => {
        const text = `<?xml version="1.0"?>\n${document}\n`;
        expect(ours(text, cut)).toEqual(theirs(text));
      }),
      { seed: 20250614, numRuns: 500 },
    );
  });
});
