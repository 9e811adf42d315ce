import { SaxesParser } from 'saxes';
import { EngineError } from '../errors';
import { LIMITS } from '../limits';
import { hostile, shown, tooLarge, unreadable } from './refuse';

/** An element with all that is in it. */
export type XmlNode = { readonly name: string; readonly attributes: Readonly<Record<string, string>>; readonly children: XmlNode[]; text: string };

/** What is done with an element: looked into, gathered whole, or passed over. */
export type XmlVisit = 'enter' | 'gather' | 'pass';

/** Who reads: asked at each element that is looked into, told what was gathered and what was left. */
export type XmlReader = {
  open(name: string, attributes: Readonly<Record<string, string>>, depth: number): XmlVisit;
  gathered(node: XmlNode, depth: number): void;
  close(name: string, depth: number): void;
  /** for sentences: where the reader stands, e.g. `measure 3` */
  where(): string | null;
};

export const childOf = (node: XmlNode | undefined, name: string): XmlNode | undefined => node?.children.find((child) => child.name === name);
export const childrenOf = (node: XmlNode | undefined, name: string): XmlNode[] => node?.children.filter((child) => child.name === name) ?? [];
export const textIn = (node: XmlNode | undefined, name: string): string | undefined => childOf(node, name)?.text.trim();

const ENTITIES = 'This file defines entities of its own (<!ENTITY …>), which could reach other files or grow without end. It is not read: export it again as plain MusicXML.';

/**
 * Reads XML as it comes, strictly, with limits; nothing that it names is fetched, and entities other than the five of XML are
 * refused.
 */
export class XmlStream {
  private readonly parser = new SaxesParser<{ position: true; xmlns: false }>({ position: true, xmlns: false });
  private readonly path: { visit: XmlVisit; node: XmlNode | null }[] = [];
  private elements = 0;
  private attributes = 0;
  private nodes = 0;
  private sinceEvent = 0;

  constructor(private readonly reader: XmlReader) {
    const { parser } = this;
    parser.on('error', (error) => this.fault(error.message));
    parser.on('doctype', (text) => {
      this.sinceEvent = 0;
      if (/<!\s*ENTITY|\[[^%]*%/i.test(text)) hostile(ENTITIES);
    });
    parser.on('opentagstart', () => {
      this.attributes = 0;
      this.sinceEvent = 0;
    });
    parser.on('attribute', () => {
      this.sinceEvent = 0;
      this.attributes += 1;
      if (this.attributes > LIMITS.xmlAttributes) hostile(`${this.place()}: one element has more than ${LIMITS.xmlAttributes} attributes, which no MusicXML has. It is not read.`);
    });
    parser.on('opentag', ({ name, attributes }) => this.open(name, attributes));
    parser.on('closetag', ({ name }) => this.close(name));
    parser.on('text', (text) => this.text(text));
    parser.on('cdata', (text) => this.text(text));
    for (const event of ['comment', 'processinginstruction', 'xmldecl'] as const) parser.on(event, () => void (this.sinceEvent = 0));
  }

  /** @throws EngineError `unreadable_music`, `hostile_file`, `too_large` */
  write(text: string): void {
    // In pieces, so that one endless text or name is noticed while it grows.
    for (let at = 0; at < text.length; at += LIMITS.xmlPiece / 8) {
      const piece = text.slice(at, at + LIMITS.xmlPiece / 8);
      this.sinceEvent += piece.length;
      this.parser.write(piece);
      if (this.sinceEvent > LIMITS.xmlPiece) hostile(`${this.place()}: one text, name or comment is longer than ${LIMITS.xmlPiece} characters, which no MusicXML has. It is not read.`);
    }
  }

  /** @throws EngineError `unreadable_music` where the end is missing */
  end(): void {
    this.parser.close();
  }

  private place(): string {
    const where = this.reader.where();
    return `Line ${this.parser.line}${where === null ? '' : ` (${where})`}`;
  }

  private fault(message: string): never {
    const said = message.replace(/^(?:\d+:\d+:?\s*)/, '');
    if (/undefined entity/i.test(said)) return hostile(`${this.place()}: an entity is named that is not defined here. It is not read: export it again as plain MusicXML.`);
    if (/unexpected end|unclosed tag|must contain a root/i.test(said) && this.path.length > 0) return unreadable(`This MusicXML is cut off: it ends in line ${this.parser.line}${this.reader.where() ? `, in ${this.reader.where()}` : ''}, before it is closed.`);
    return unreadable(`This is no well-formed MusicXML: the file is damaged, or of another kind. ${this.place()}, character ${this.parser.column}.`);
  }

  private open(name: string, attributes: Record<string, string>): void {
    this.sinceEvent = 0;
    this.elements += 1;
    const depth = this.path.length;
    if (this.elements > LIMITS.xmlElements) tooLarge(`This MusicXML has more than ${LIMITS.xmlElements} elements, which is the limit. Save the part that is needed as a file of its own.`);
    if (depth >= LIMITS.xmlDepth) hostile(`${this.place()}: elements stand inside each other more than ${LIMITS.xmlDepth} deep, which no MusicXML does. It is not read.`);
    const parent = this.path.at(-1);
    if (parent?.visit === 'pass') {
      this.path.push({ visit: 'pass', node: null });
      return;
    }
    if (parent?.node) {
      this.nodes += 1;
      if (this.nodes > LIMITS.xmlNodes) hostile(`${this.place()}: “${shown(this.path.find(({ node }) => node)!.node!.name)}” holds more than ${LIMITS.xmlNodes} elements, which no MusicXML does. It is not read.`);
      const node: XmlNode = { name, attributes, children: [], text: '' };
      parent.node.children.push(node);
      this.path.push({ visit: 'gather', node });
      return;
    }
    const visit = this.reader.open(name, attributes, depth);
    if (visit === 'gather') this.nodes = 0;
    this.path.push({ visit, node: visit === 'gather' ? { name, attributes, children: [], text: '' } : null });
  }

  private close(name: string): void {
    this.sinceEvent = 0;
    const { visit, node } = this.path.pop()!;
    const depth = this.path.length;
    if (visit === 'enter') this.reader.close(name, depth);
    if (node && !this.path.at(-1)?.node) this.reader.gathered(node, depth);
  }

  private text(text: string): void {
    this.sinceEvent = 0;
    const node = this.path.at(-1)?.node;
    if (node) node.text += text;
  }
}

/** Reads all of it. */
export async function readXml(texts: AsyncIterable<string>, reader: XmlReader): Promise<void> {
  const stream = new XmlStream(reader);
  let isBegun = false;
  for await (const text of texts) {
    if (!isBegun && text.trim() !== '') {
      isBegun = true;
      const first = text.replace(/^\ufeff/, '').trimStart()[0];
      if (first !== '<') throw new EngineError('unreadable_music', `This is no MusicXML: it begins with “${shown(first ?? '')}”, not with “<”.`);
    }
    stream.write(text);
  }
  if (!isBegun) throw new EngineError('unreadable_music', 'This file is empty.');
  stream.end();
}
