/** An element of a parsed document. */
export interface XmlElement {
  readonly tag: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: readonly XmlElement[];
  /** Character data directly inside, entities resolved. */
  readonly text: string;
}

/** A small strict XML parser, by hand and without mercy: whatever is not well-formed throws with its place. */
export function parseXml(source: string): XmlElement {
  let at = 0;
  const fail = (what: string): never => {
    throw new Error(`not well-formed at ${at} (${source.slice(Math.max(0, at - 20), at + 20)}): ${what}`);
  };
  const skipBlanks = (): void => {
    while (" \n\t\r".includes(source[at] ?? "x")) at += 1;
  };
  const expectNext = (text: string): void => {
    if (!source.startsWith(text, at)) fail(`expected ${text}`);
    at += text.length;
  };
  const readName = (): string => {
    const start = at;
    while (/[A-Za-z0-9:_-]/.test(source[at] ?? "")) at += 1;
    return at === start ? fail("expected a name") : source.slice(start, at);
  };
  const readUntil = (end: string): string => {
    const stop = source.indexOf(end, at);
    if (stop < 0) fail(`expected ${end}`);
    const raw = source.slice(at, stop);
    at = stop;
    if (raw.includes("<")) fail("a bare < in text");
    return resolve(raw, fail);
  };
  const readElement = (): XmlElement => {
    expectNext("<");
    const tag = readName();
    const attributes: Record<string, string> = {};
    for (skipBlanks(); source[at] !== ">" && source[at] !== "/"; skipBlanks()) {
      const name = readName();
      if (Object.hasOwn(attributes, name)) fail(`${name} twice`);
      expectNext('="');
      attributes[name] = readUntil('"');
      expectNext('"');
    }
    if (source[at] === "/") {
      expectNext("/>");
      return { tag, attributes, children: [], text: "" };
    }
    expectNext(">");
    const children: XmlElement[] = [];
    let text = "";
    while (!source.startsWith("</", at)) {
      if (source[at] === "<") children.push(readElement());
      else if (at >= source.length) fail(`${tag} never ends`);
      else text += readUntil("<");
    }
    expectNext(`</${tag}>`);
    return { tag, attributes, children, text };
  };
  const root = readElement();
  skipBlanks();
  return at === source.length ? root : fail("something after the root");
}

const entities: Readonly<Record<string, string>> = { amp: "&", lt: "<", gt: ">", quot: '"' };

function resolve(raw: string, fail: (what: string) => never): string {
  const [first = "", ...parts] = raw.split("&");
  for (const character of raw) if (character < " " && !"\n\t\r".includes(character)) fail("a control character");
  return parts.reduce((text, part) => {
    const end = part.indexOf(";");
    const entity = entities[part.slice(0, end)];
    return end < 0 || entity === undefined ? fail("a bare &") : text + entity + part.slice(end + 1);
  }, first);
}

/** The element and all below it. */
export function everyElement(root: XmlElement): readonly XmlElement[] {
  return [root, ...root.children.flatMap(everyElement)];
}

/** Numbers in an attribute that holds coordinates. */
export function numbersIn(value: string): readonly number[] {
  return (value.match(/-?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?|NaN|Infinity|undefined/g) ?? []).map(Number);
}
