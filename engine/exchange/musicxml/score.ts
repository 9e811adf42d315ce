import { formatFraction, toFraction } from '../../exact/fraction';
import { LIMITS } from '../../limits';
import { Names } from '../names';
import { Odd } from '../odd';
import { shown, tooLarge, unreadable } from '../refuse';
import { type XmlNode, type XmlReader, type XmlVisit, childOf, childrenOf, textIn } from '../read-xml';
import { nextStep } from '../steps';
import type { Candidate, ReadOptions } from '../types';
import { PartReader } from './part';
import { type TempoAt, isJump, tempoOf } from './tempo';
import { type Declared, voiceRhythm } from './voice';

const OF_A_MEASURE = new Set(['note', 'attributes', 'backup', 'forward', 'direction', 'sound', 'barline']);

type Listed = { readonly name: string; readonly declared: Declared };

function listed(node: XmlNode): Listed {
  const midi = new Map(childrenOf(node, 'midi-instrument').map((one) => [one.attributes.id, Number(textIn(one, 'midi-unpitched') ?? -1)]));
  const declared = new Map(childrenOf(node, 'score-instrument').map((one) => [one.attributes.id ?? '', { name: textIn(one, 'instrument-name') ?? '', midi: midi.get(one.attributes.id) ?? -1 }]));
  return { name: shown(childOf(node, 'part-name')?.text ?? '', LIMITS.name), declared };
}

/** Reads a score as its elements come, part by part or measure by measure. */
export class ScoreReader implements XmlReader {
  private readonly listed = new Map<string, Listed>();
  private readonly parts = new Map<string, PartReader>();
  private readonly tempos: TempoAt[] = [];
  private readonly odd = new Odd();
  private kind: 'partwise' | 'timewise' | null = null;
  private part: PartReader | null = null;
  private measure: { number: string; isImplicit: boolean } | null = null;

  where(): string | null {
    if (this.measure === null) return this.part === null ? null : this.part.name;
    return `measure ${this.measure.number}${this.part === null ? '' : ` of ${this.part.name}`}`;
  }

  open(name: string, attributes: Readonly<Record<string, string>>, depth: number): XmlVisit {
    if (depth === 0) return this.root(name);
    const [outer, inner] = this.kind === 'partwise' ? ['part', 'measure'] : ['measure', 'part'];
    if (depth === 1 && name === 'part-list') return 'enter';
    if (depth === 2 && name === 'score-part') return 'gather';
    if ((depth === 1 && name === outer) || (depth === 2 && name === inner)) {
      this.enter(name, attributes);
      return 'enter';
    }
    return depth === 3 && OF_A_MEASURE.has(name) ? 'gather' : 'pass';
  }

  private root(name: string): XmlVisit {
    if (name !== 'score-partwise' && name !== 'score-timewise') unreadable(`This is XML, but no music that can be read: its root is “${shown(name, 40)}”, not “score-partwise”.`);
    this.kind = name === 'score-partwise' ? 'partwise' : 'timewise';
    return 'enter';
  }

  private enter(name: string, { id = '', number, implicit }: Readonly<Record<string, string>>): void {
    if (name === 'part') {
      this.part = this.parts.get(id) ?? this.addPart(id);
    } else {
      this.measure = { number: shown(number ?? '?', 16), isImplicit: implicit === 'yes' || number === '0' };
    }
    if (this.part && this.measure) this.part.begin(this.measure.number, this.measure.isImplicit);
  }

  private addPart(id: string): PartReader {
    if (this.parts.size >= LIMITS.candidates) tooLarge(`This file has more than ${LIMITS.candidates} parts, which is the limit.`);
    const { name, declared } = this.listed.get(id) ?? { name: '', declared: new Map() };
    const part = new PartReader(id, name || `Part ${this.parts.size + 1}`, declared);
    this.parts.set(id, part);
    return part;
  }

  gathered(node: XmlNode, depth: number): void {
    if (depth === 2) this.listed.set(node.attributes.id ?? '', listed(node));
    else if (node.name === 'direction' || node.name === 'sound') this.direction(node);
    else this.part?.take(node);
  }

  private direction(node: XmlNode): void {
    const tempo = tempoOf(node);
    if (tempo && this.part) this.tempos.push({ at: this.part.now, tempo });
    if (isJump(node)) this.odd.note('Jumps such as da capo are not followed', this.measure?.number);
  }

  close(name: string): void {
    if (name === (this.kind === 'partwise' ? 'measure' : 'part')) this.part?.close();
    if (name === 'measure') this.measure = null;
    if (name === 'part') this.part = null;
  }

  /** @throws EngineError `unreadable_music`, `too_large`, `too_fine`, `out_of_time` */
  async candidates(options: ReadOptions): Promise<Candidate[]> {
    const first = this.tempos.reduce<TempoAt | undefined>((best, one) => (best === undefined || one.at.compare(best.at) < 0 ? one : best), undefined);
    const speed = ({ tempo }: TempoAt) => formatFraction(toFraction(tempo.beat).mul(toFraction(tempo.perMinute)));
    if (first === undefined) this.odd.note('The file does not say a tempo: 120 quarter notes a minute were assumed');
    else if (new Set(this.tempos.map(speed)).size > 1) this.odd.note('The tempo changes on the way: the first one was taken');
    const names = new Names();
    const found: Candidate[] = [];
    for (const part of this.parts.values()) {
      for (const { id, events, odd } of part.voices.values()) {
        if (found.length >= LIMITS.candidates) tooLarge(`This file has more than ${LIMITS.candidates} voices, which is the limit. Save the part that is needed as a file of its own.`);
        const rhythm = voiceRhythm(events, part.total, part.declared, odd);
        if (rhythm.length === 0) continue;
        const warnings = [...part.odd.sentences(), ...odd.sentences(), ...this.odd.sentences()];
        const name = names.unlike(part.voices.size === 1 ? part.name : `${part.name}, voice ${id}`);
        found.push({ name, metre: part.firstMetre, tempo: first?.tempo ?? { beat: '1/4', perMinute: '120' }, rhythm, warnings, measures: part.measures });
        await nextStep(options);
      }
    }
    if (found.length === 0) unreadable(this.parts.size === 0 ? 'This MusicXML holds no part.' : 'This MusicXML holds no note and no rest in any part.');
    return found;
  }
}
