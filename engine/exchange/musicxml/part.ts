import { Fraction, ZERO, formatFraction } from '../../exact/fraction';
import { LIMITS } from '../../limits';
import { type Metre, parseMetre } from '../../rhythm/metre';
import { Fineness } from '../assemble';
import { Odd } from '../odd';
import { tooLarge, unreadable } from '../refuse';
import { type XmlNode, childOf, childrenOf, textIn } from '../read-xml';
import type { ReadMeasure } from '../types';
import { decimalOf, durationOf, writtenLength } from './lengths';
import { metreOf } from './metre';
import { type NoteEvent, keyOf, marksOf, tiesOf } from './note';
import type { Declared } from './voice';

/** A voice as it is read: what is written in it, and what is odd about it. */
export type ReadVoice = { readonly id: string; readonly events: NoteEvent[]; readonly odd: Odd };

/** Reads one part, measure by measure, element by element. Positions are exact, in whole notes from its start. */
export class PartReader {
  readonly voices = new Map<string, ReadVoice>();
  readonly measures: ReadMeasure[] = [];
  readonly odd = new Odd();
  private readonly fineness = new Fineness();
  private divisions: Fraction | null = null;
  private metre: Metre | null = '4/4';
  private saysMetre = false;
  private number = '';
  private isImplicit = false;
  private start = ZERO;
  private end = ZERO;
  private last: { event: NoteEvent; voice: ReadVoice } | null = null;
  /** where the next element stands */
  now = ZERO;

  constructor(
    readonly id: string,
    readonly name: string,
    readonly declared: Declared,
  ) {}

  get total(): Fraction {
    return this.end;
  }

  /** the metre at the start, as far as the file says one */
  get firstMetre(): Metre {
    return this.measures[0]?.metre ?? '4/4';
  }

  begin(number: string, isImplicit: boolean): void {
    if (this.measures.length >= LIMITS.measures) tooLarge(`This file has more than ${LIMITS.measures} measures, which is the limit. Save the part that is needed as a file of its own.`);
    this.number = number;
    this.isImplicit = isImplicit;
    this.start = this.end;
    this.now = this.end;
    this.last = null;
  }

  private get where(): string {
    return `Measure ${this.number}`;
  }

  /** One element of the measure. */
  take(node: XmlNode): void {
    if (node.name === 'note') this.note(node);
    else if (node.name === 'attributes') this.attributes(node);
    else if (node.name === 'backup') this.move(this.lengthOf(node).neg());
    else if (node.name === 'forward') this.move(this.lengthOf(node));
    else if (node.name === 'barline') this.barline(node);
  }

  private move(by: Fraction): void {
    this.now = this.now.add(by);
    this.last = null;
    if (this.now.compare(this.start) < 0) {
      this.odd.note('The file goes back beyond the beginning of a measure: its beginning was meant', this.number);
      this.now = this.start;
    }
    if (this.now.compare(this.end) > 0) this.end = this.now;
  }

  private lengthOf(node: XmlNode): Fraction {
    if (this.divisions === null) this.odd.note('The file does not say how a quarter note is divided: 1 was assumed, as is customary', this.number);
    this.divisions ??= new Fraction(1);
    const length = durationOf(node, this.divisions, this.where) ?? unreadable(`${this.where}: a step forwards or backwards has no duration.`);
    this.fineness.add(length, this.where);
    return length;
  }

  private attributes(node: XmlNode): void {
    const divisions = textIn(node, 'divisions');
    if (divisions !== undefined) {
      const count = decimalOf(divisions);
      if (count === undefined || count.n === 0n) unreadable(`${this.where}: the number of divisions is no number above 0.`);
      this.divisions = count!;
    }
    const time = childOf(node, 'time');
    if (time) {
      const metre = metreOf(time);
      if (metre === undefined) this.odd.note('The metre cannot be read: the one before was kept', this.number);
      else this.metre = metre;
      this.saysMetre = true;
    }
    for (const style of childrenOf(node, 'measure-style')) {
      if (childOf(style, 'measure-repeat') || childOf(style, 'beat-repeat') || childOf(style, 'slash')) this.odd.note('Signs that repeat a measure or a beat are not followed: what is written was read', this.number);
    }
  }

  private barline(node: XmlNode): void {
    if (childOf(node, 'repeat')) this.odd.note('Repeats are read once', this.number);
    if (childOf(node, 'ending')) this.odd.note('First and second endings are read one after another', this.number);
  }

  private noteLength(node: XmlNode): Fraction | undefined {
    if (childOf(node, 'duration')) {
      const length = this.lengthOf(node);
      const written = childOf(node, 'time-modification') && writtenLength(node);
      // A division that cannot hold a tuplet has rounded it: said, not mended, since the measure adds up as it stands.
      if (written && !written.equals(length) && written.sub(length).abs().compare(new Fraction(1, 4).div(this.divisions!)) < 0) this.odd.note('A tuplet is rounded in the file: its lengths were taken as they stand', this.number);
      return length;
    }
    const rest = childOf(node, 'rest');
    if (rest?.attributes.measure === 'yes' && this.metre !== null) return parseMetre(this.metre).length;
    const length = writtenLength(node);
    if (length) this.fineness.add(length, this.where);
    return length;
  }

  private voiceOf(node: XmlNode): ReadVoice {
    const staff = textIn(node, 'staff') ?? '1';
    const id = textIn(node, 'voice') ?? (staff === '1' ? '1' : `1 on staff ${staff}`);
    let voice = this.voices.get(id);
    if (voice === undefined) {
      if (this.voices.size >= LIMITS.candidates) tooLarge(`${this.name} has more than ${LIMITS.candidates} voices, which is the limit.`);
      voice = { id, events: [], odd: new Odd() };
      this.voices.set(id, voice);
    }
    return voice;
  }

  private note(node: XmlNode): void {
    const voice = this.voiceOf(node);
    if (childOf(node, 'grace')) return voice.odd.note('Grace notes were left out', this.number);
    const isRest = childOf(node, 'rest') !== undefined;
    const isCue = childOf(node, 'cue') !== undefined;
    if (isCue) voice.odd.note('Cue notes were left out', this.number);
    if (childOf(node, 'chord')) return this.chord(node, isRest || isCue);
    const length = this.noteLength(node);
    if (length === undefined || length.n === 0n) return voice.odd.note('A note without a length was left out', this.number);
    const ties = tiesOf(node);
    const silent = isRest || isCue;
    const event: NoteEvent = {
      start: this.now, end: this.now.add(length), measure: this.number, isRest: silent, keys: silent ? [] : [keyOf(node)],
      isTiedFromBefore: ties.isFrom, isTiedOn: ties.isOn, ...(silent ? { accent: undefined, roll: false } : marksOf(node, voice.odd, this.number)),
    };
    if (voice.events.length >= LIMITS.rhythmValues) tooLarge(`A voice of ${this.name} has more than ${LIMITS.rhythmValues} notes and rests, which is the limit. Save the part that is needed as a file of its own.`);
    voice.events.push(event);
    this.move(length);
    this.last = { event, voice };
  }

  /** A further note of a chord: no attack of its own. */
  private chord(node: XmlNode, isSilent: boolean): void {
    const before = this.last;
    if (!before || isSilent || before.event.isRest) return;
    const { event, voice } = before;
    const ties = tiesOf(node);
    const { accent, roll } = marksOf(node, voice.odd, this.number);
    event.keys.push(keyOf(node));
    event.isTiedFromBefore &&= ties.isFrom;
    event.isTiedOn ||= ties.isOn;
    event.accent ??= accent;
    event.roll ||= roll;
    voice.odd.note('Chords count as one attack');
  }

  close(): void {
    const metre = this.metre ?? this.measures.at(-1)?.metre ?? '4/4';
    const full = parseMetre(metre).length;
    if (this.end.equals(this.start) && this.metre !== null) {
      this.odd.note('An empty measure was read as a rest', this.number);
      this.end = this.start.add(full);
    }
    const length = this.end.sub(this.start);
    if (length.n === 0n) return;
    const over = length.compare(full);
    const differs = `it lasts ${formatFraction(length)} of a whole note, where ${metre} lasts ${formatFraction(full)}`;
    if (this.metre !== null && over > 0) this.odd.note(`A measure is over-full: ${differs}`, this.number);
    if (this.metre !== null && over < 0 && !this.isImplicit) this.odd.note(`A measure is not full: ${differs}`, this.number);
    if (this.metre === null) this.odd.note('Measures without a metre stand as long as they are written', this.number);
    const before = this.measures.at(-1)?.metre;
    if (before !== undefined && before !== metre) this.odd.note(`The metre changes to ${metre}`, this.number);
    if (!this.saysMetre && this.measures.length === 0) this.odd.note('The file does not say a metre: 4/4 was assumed');
    this.measures.push({ number: this.number, start: this.start, length, metre });
  }
}
