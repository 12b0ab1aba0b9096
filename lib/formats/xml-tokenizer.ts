import { refusal } from "./refusal";
import type { ReadLimits } from "./read-limits";

/** A tag name, split once for all its uses; `code` is what the handler's `codeOf` made of the local name. */
export type TagName = {
  readonly qualified: string;
  readonly local: string;
  readonly prefix: string;
  readonly code: number;
};

/**
 * What listens to the tokenizer. `attributes` is name, value, name, value ... and is only good during the
 * call. Text arrives, entities resolved and possibly in pieces, only while `wantsText` is true.
 */
export interface TagHandler {
  readonly wantsText: boolean;
  codeOf(local: string): number;
  open(name: TagName, attributes: readonly string[], depth: number): void;
  text(text: string): void;
  close(name: TagName, depth: number): void;
}

/** A name and the name that followed it the last time. */
type Tag = TagName & { next: Tag | null };

const NAMELESS: Tag = { qualified: "", local: "", prefix: "", code: 0, next: null };
const NO_ATTRIBUTES: readonly string[] = [];
const ENTITIES: Readonly<Record<string, string>> = { amp: "&", lt: "<", gt: ">", quot: '"', apos: "'" };
const ENTITY = /&(#x[0-9a-fA-F]{1,8}|#\d{1,8}|\w{1,8});/g;
const BAD_NAME = /[<"'&=;,(){}[\]\\]/;
const NAMES_CACHED_MAX = 4096;
const ENTITY_LENGTH_MAX = 12;

function entity(whole: string, body: string): string {
  if (body.charCodeAt(0) !== 35) return ENTITIES[body] ?? whole;
  const code = body.charCodeAt(1) === 120 ? Number.parseInt(body.slice(2), 16) : Number(body.slice(1));
  return code > 0x10ffff || (code >= 0xd800 && code <= 0xdfff) ? whole : String.fromCodePoint(code);
}

/**
 * Text with the five entities of XML and character references resolved; unknown ones stay as they are.
 *
 * @example
 * resolveEntities("a &lt; b &#233;"); // "a < b é"
 */
export function resolveEntities(text: string): string {
  return text.includes("&") ? text.replace(ENTITY, entity) : text;
}

/** `startsWith`, by hand: for names of a few characters five times as fast as the built-in. */
function standsAt(text: string, name: string, at: number): boolean {
  const length = name.length;
  for (let index = 0; index < length; index++) {
    if (text.charCodeAt(at + index) !== name.charCodeAt(index)) return false;
  }
  return true;
}

function isNameStart(code: number): boolean {
  return (
    (code >= 97 && code <= 122) || (code >= 65 && code <= 90) || code === 95 || code === 58 || code >= 128
  );
}

/**
 * Cuts XML into tags and text as it streams by, with hard limits and without ever holding more than one
 * token: about three times as fast as a general parser because it makes no objects, resolves no namespaces
 * and checks no characters. It demands what makes a tree (matching tags, quoted attributes, one root) and is
 * lenient about what real loggers get wrong (undeclared prefixes, stray bytes, unknown entities).
 *
 * Shapes: `write` takes text in pieces cut anywhere; `end` tells whether the root was closed.
 * Errors: ParseError `not_well_formed`, `doctype`, `unknown_format` (a web page), `too_deep`,
 * `too_many_attributes`, `attribute_too_long`, `text_too_long`. A DOCTYPE is refused, so no entity is ever
 * defined or fetched. Source: XML 1.0 (5th ed.), productions 1 to 44.
 */
export class XmlTokenizer {
  private handler: TagHandler;
  private readonly limits: ReadLimits;
  private chunk = "";
  private at = 0;
  private consumed = 0;
  private skipTo: string | null = null;
  private skipIsCdata = false;
  private skipped = 0;
  private textLength = 0;
  private readonly stack: Tag[] = [];
  private depth = 0;
  private previous: Tag = { ...NAMELESS };
  private rootClosed = false;
  private names = new Map<string, Tag>();
  private attributes: readonly string[] = NO_ATTRIBUTES;

  constructor(handler: TagHandler, limits: ReadLimits) {
    this.handler = handler;
    this.limits = limits;
  }

  /** Another listener takes over from the next tag on; the one just opened is told to it by the caller. */
  handOver(handler: TagHandler): void {
    this.handler = handler;
    this.names = new Map();
    this.previous = { ...NAMELESS };
  }

  /** Where the tokenizer stands, in characters from the start of the text. */
  get place(): string {
    return `character ${(this.consumed + this.at).toLocaleString("en")}`;
  }

  write(text: string): void {
    this.consumed += this.at;
    this.chunk = this.at === this.chunk.length ? text : this.chunk.slice(this.at) + text;
    this.at = 0;
    while (this.at < this.chunk.length && this.step());
  }

  /** Tells whether the document was whole: a root that was opened and closed, nothing half-said behind it. */
  end(): boolean {
    return this.rootClosed && this.skipTo === null;
  }

  /** One token; false when its end has not arrived yet. */
  private step(): boolean {
    if (this.skipTo !== null) return this.skip(this.skipTo);
    const open = this.nextTag();
    if (open !== this.at) {
      const whole = this.takeText(open < 0 ? this.chunk.length : open, open >= 0);
      if (!whole || open < 0) return false;
    }
    this.textLength = 0;
    const code = this.chunk.charCodeAt(open + 1);
    if (code === 47) return this.closeTag(open);
    if (code === 33) return this.declaration(open);
    if (code === 63) return this.startSkip("?>", open + 2);
    if (isNameStart(code)) return this.openTag(open);
    if (open + 1 === this.chunk.length) return false;
    throw this.damage();
  }

  /** The next "<" or -1; between tags stand a few blanks as a rule, which are passed faster by hand. */
  private nextTag(): number {
    const text = this.chunk;
    for (let at = this.at, near = at + 24; at < near; at++) if (text.charCodeAt(at) === 60) return at;
    return text.indexOf("<", this.at);
  }

  private damage(): Error {
    return refusal("not_well_formed", { place: this.place });
  }

  private takeText(end: number, ended: boolean): boolean {
    let stop = end;
    this.textLength += end - this.at;
    if (this.textLength > this.limits.textLength) throw this.tooLong();
    if (this.handler.wantsText) {
      if (!ended) {
        const ampersand = this.chunk.lastIndexOf("&");
        const open = ampersand >= this.at && end - ampersand < ENTITY_LENGTH_MAX;
        if (open && this.chunk.indexOf(";", ampersand) < 0) stop = ampersand;
      }
      if (stop > this.at) this.handler.text(resolveEntities(this.chunk.slice(this.at, stop)));
    }
    this.textLength -= end - stop;
    this.at = stop;
    return stop === end;
  }

  private tooLong(): Error {
    return refusal("text_too_long", {
      place: this.place,
      limit: `${this.limits.textLength.toLocaleString("en")} characters`,
    });
  }

  private startSkip(until: string, from: number, cdata = false): boolean {
    this.skipTo = until;
    this.skipIsCdata = cdata;
    this.skipped = 0;
    this.at = from;
    return true;
  }

  /** Passes over a comment, an instruction or a CDATA block, keeping nothing but a split end mark. */
  private skip(until: string): boolean {
    const found = this.chunk.indexOf(until, this.at);
    const end = found < 0 ? Math.max(this.at, this.chunk.length - until.length + 1) : found;
    this.skipped += end - this.at;
    if (this.skipped > this.limits.textLength) throw this.tooLong();
    if (this.skipIsCdata && this.handler.wantsText && end > this.at) {
      this.handler.text(this.chunk.slice(this.at, end));
    }
    this.at = found < 0 ? end : found + until.length;
    if (found >= 0) this.skipTo = null;
    return found >= 0;
  }

  private declaration(open: number): boolean {
    const text = this.chunk;
    if (text.startsWith("<!--", open)) return this.startSkip("-->", open + 4);
    if (text.startsWith("<![CDATA[", open)) return this.startSkip("]]>", open + 9, true);
    if (text.length - open < 16) return false;
    if (/^<!doctype\s+html/i.test(text.slice(open, open + 16))) {
      throw refusal("unknown_format", { found: "It holds a web page, not a track" });
    }
    if (/^<!doctype/i.test(text.slice(open, open + 16))) throw refusal("doctype", { place: this.place });
    throw this.damage();
  }

  private closeTag(open: number): boolean {
    const text = this.chunk;
    const depth = this.depth;
    const expected = depth > 0 ? (this.stack[depth - 1] as Tag) : null;
    let at = open + 2 + (expected === null ? 0 : expected.qualified.length);
    const matches = expected !== null && standsAt(text, expected.qualified, open + 2);
    let code = text.charCodeAt(at);
    while (matches && code <= 32) code = text.charCodeAt(++at);
    if (!matches || code !== 62) {
      if (text.indexOf(">", open) < 0 && text.length - open < this.limits.attributeLength) return false;
      throw this.damage();
    }
    this.depth = depth - 1;
    this.at = at + 1;
    this.handler.close(expected, depth);
    if (depth === 1) this.rootClosed = true;
    return true;
  }

  private openTag(open: number): boolean {
    const text = this.chunk;
    const guess = this.guess(open);
    let at = guess === null ? open + 2 : open + 1 + guess.qualified.length;
    let code = text.charCodeAt(at);
    while (code > 32 && code !== 62 && code !== 47) code = text.charCodeAt(++at);
    const nameEnd = at;
    this.attributes = NO_ATTRIBUTES;
    if (code <= 32) {
      at = this.takeAttributes(open, at);
      code = text.charCodeAt(at);
    }
    if (code !== 62 && !(code === 47 && text.charCodeAt(at + 1) === 62)) {
      if (at + 1 < text.length && at >= 0) throw this.damage();
      return this.waitForTag(open);
    }
    if (this.rootClosed) throw this.damage();
    const depth = this.depth + 1;
    if (depth > this.limits.depth) {
      throw refusal("too_deep", { place: this.place, limit: String(this.limits.depth) });
    }
    const name = guess ?? this.nameOf(text.slice(open + 1, nameEnd));
    this.previous.next = name;
    this.previous = name;
    this.at = code === 62 ? at + 1 : at + 2;
    this.stack[depth - 1] = name;
    this.depth = depth;
    this.handler.open(name, this.attributes, depth);
    if (code === 62) return true;
    this.depth = depth - 1;
    this.handler.close(name, depth);
    if (depth === 1) this.rootClosed = true;
    return true;
  }

  /** Tags follow each other in the same order fix after fix: the name that came next the last time, if it is. */
  private guess(open: number): Tag | null {
    const { next } = this.previous;
    if (next === null || !standsAt(this.chunk, next.qualified, open + 1)) return null;
    const code = this.chunk.charCodeAt(open + 1 + next.qualified.length);
    return code <= 32 || code === 62 || code === 47 ? next : null;
  }

  /** A tag whose end has not arrived: wait, unless it is already longer than any tag may be. */
  private waitForTag(open: number): false {
    if (this.chunk.length - open > 4 * this.limits.attributeLength) throw this.attributeTooLong();
    return false;
  }

  private attributeTooLong(): Error {
    return refusal("attribute_too_long", {
      place: this.place,
      limit: `${this.limits.attributeLength.toLocaleString("en")} characters`,
    });
  }

  /** Collects the attributes from `from`; returns where the tag ends, or -1 when that has not arrived. */
  private takeAttributes(open: number, from: number): number {
    const text = this.chunk;
    const attributes: string[] = [];
    let at = from;
    for (;;) {
      let code = text.charCodeAt(at);
      while (code <= 32) code = text.charCodeAt(++at);
      if (code === 62 || code === 47) {
        this.attributes = attributes;
        return at;
      }
      const nameStart = at;
      while (code > 32 && code !== 61 && code !== 62) code = text.charCodeAt(++at);
      const nameEnd = at;
      while (code <= 32) code = text.charCodeAt(++at);
      if (at >= text.length) return -1;
      if (code !== 61 || nameEnd === nameStart) throw this.damage();
      code = text.charCodeAt(++at);
      while (code <= 32) code = text.charCodeAt(++at);
      if (at >= text.length) return -1;
      if (code !== 34 && code !== 39) throw this.damage();
      const valueEnd = text.indexOf(code === 34 ? '"' : "'", at + 1);
      const length = (valueEnd < 0 ? text.length : valueEnd) - at - 1;
      if (length > this.limits.attributeLength) throw this.attributeTooLong();
      if (valueEnd < 0) return -1;
      attributes.push(text.slice(nameStart, nameEnd), resolveEntities(text.slice(at + 1, valueEnd)));
      if (attributes.length > 2 * this.limits.attributes) {
        throw refusal("too_many_attributes", {
          place: this.place,
          limit: String(this.limits.attributes),
        });
      }
      if (valueEnd - open > 4 * this.limits.attributeLength) throw this.attributeTooLong();
      at = valueEnd + 1;
    }
  }

  private nameOf(qualified: string): Tag {
    const known = this.names.get(qualified);
    if (known !== undefined) return known;
    if (BAD_NAME.test(qualified)) throw this.damage();
    const colon = qualified.indexOf(":");
    const local = qualified.slice(colon + 1);
    const name = {
      qualified,
      local,
      prefix: colon < 0 ? "" : qualified.slice(0, colon),
      code: this.handler.codeOf(local),
      next: null,
    };
    if (this.names.size < NAMES_CACHED_MAX) this.names.set(qualified, name);
    return name;
  }
}
