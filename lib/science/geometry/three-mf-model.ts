import { SaxesParser, type SaxesTagPlain } from "saxes";
import { Refusal } from "@/lib/science/refusal";
import { GrowingFloats } from "./growing";
import { parseTransform, type Transform } from "./transform";

/** One use of an object: by a build item or as a component of another object. */
export interface ModelUse {
  readonly objectId: string;
  /** Part of the package that holds the object (production extension); undefined for the same part. */
  readonly path: string | undefined;
  readonly transform: Transform;
}

/** One object of a 3MF model part: a mesh, or components, or neither. */
export interface ModelObject {
  readonly id: string;
  readonly type: string;
  readonly positions: GrowingFloats;
  readonly triangles: GrowingFloats;
  readonly components: ModelUse[];
}

const DEPTH_MAX = 64;
/** A model part has short names and numbers: this many characters without an element is an attack on memory. */
const SILENCE_CHARS_MAX = 2_097_152;
const NUMBER = /^\s*[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d{1,4})?\s*$/;

/** Parser of the XML of one 3MF model part (3MF Core Specification 1.4.0). Feed text, then `close`. */
export class ModelPartParser {
  unit = "millimeter";
  readonly objects = new Map<string, ModelObject>();
  readonly items: ModelUse[] = [];
  triangles = 0;
  private readonly sax = new SaxesParser({ xmlns: false, position: true });
  private object: ModelObject | undefined;
  private prefix: string | undefined;
  private depth = 0;
  private silence = 0;

  constructor() {
    this.sax.on("error", (error) => {
      throw new Refusal(
        "xml-broken",
        "The XML in the 3MF file is damaged.",
        `line ${this.sax.line}: ${error.message.slice(0, 120)}`,
      );
    });
    this.sax.on("doctype", () => {
      throw new Refusal(
        "xml-doctype",
        "The XML in the 3MF file declares a document type or entities, which is refused.",
      );
    });
    this.sax.on("opentag", (tag) => this.open(tag));
    this.sax.on("closetag", (tag) => {
      this.depth--;
      if (this.coreName(tag.name) === "object") this.object = undefined;
    });
  }

  feed(text: string): void {
    this.silence += text.length;
    if (this.silence > SILENCE_CHARS_MAX) throw new Refusal("xml-too-long", "A text in the 3MF file never ends.");
    this.sax.write(text);
  }

  close(): void {
    this.sax.close();
  }

  private coreName(name: string): string | undefined {
    const colon = name.indexOf(":");
    const prefix = colon < 0 ? "" : name.slice(0, colon);
    this.prefix ??= prefix;
    return prefix === this.prefix ? name.slice(colon + 1) : undefined;
  }

  private open(tag: SaxesTagPlain): void {
    this.silence = 0;
    this.depth++;
    if (this.depth > DEPTH_MAX) throw new Refusal("xml-too-deep", "The XML in the 3MF file is nested too deeply.");
    const { attributes } = tag;
    const object = this.object;
    switch (this.coreName(tag.name)) {
      case "model":
        this.unit = attributes["unit"] ?? "millimeter";
        return;
      case "object":
        return this.openObject(attributes);
      case "vertex":
        return object?.positions.push3(
          this.number(attributes, "x"),
          this.number(attributes, "y"),
          this.number(attributes, "z"),
        );
      case "triangle":
        this.triangles++;
        return object?.triangles.push3(
          this.index(attributes, "v1"),
          this.index(attributes, "v2"),
          this.index(attributes, "v3"),
        );
      case "component":
        object?.components.push(this.use(attributes));
        return;
      case "item":
        this.items.push(this.use(attributes));
        return;
      default:
    }
  }

  private openObject(attributes: Record<string, string>): void {
    const id = attributes["id"] ?? "";
    if (this.objects.has(id))
      throw new Refusal("3mf-object", `Two objects of the 3MF file have the id ${id.slice(0, 20)}.`);
    const made: ModelObject = {
      id,
      type: attributes["type"] ?? "model",
      positions: new GrowingFloats(),
      triangles: new GrowingFloats(),
      components: [],
    };
    this.objects.set(id, made);
    this.object = made;
  }

  private use(attributes: Record<string, string>): ModelUse {
    const pathKey = Object.keys(attributes).find((key) => key === "path" || key.endsWith(":path"));
    const path = pathKey === undefined ? undefined : attributes[pathKey]?.replace(/^\//, "");
    return { objectId: attributes["objectid"] ?? "", path, transform: parseTransform(attributes["transform"]) };
  }

  private number(attributes: Record<string, string>, name: string): number {
    const text = attributes[name] ?? "";
    const value = text.length <= 1024 && NUMBER.test(text) ? Number(text) : NaN;
    if (!Number.isFinite(value))
      throw new Refusal("not-finite", `A vertex has no number as its ${name}.`, `line ${this.sax.line}`);
    return value;
  }

  private index(attributes: Record<string, string>, name: string): number {
    const text = attributes[name] ?? "";
    const value = /^\s*\d{1,10}\s*$/.test(text) ? Number(text) : NaN;
    const vertices = (this.object?.positions.length ?? 0) / 3;
    if (!(value < vertices)) {
      throw new Refusal("3mf-index", `A triangle names a vertex that isn't there (${name}).`, `line ${this.sax.line}`);
    }
    return value;
  }
}
