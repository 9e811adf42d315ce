'use client';

import type { ReactNode } from 'react';
import { type Section, type SentenceControl, type SentencePart, sectionSentence } from '@/engine';
import { Token } from '../ui/token';
import { BeforeControl } from './before-control';
import { useStudy } from './context';
import { tint } from './family';
import { FieldControl } from './field-control';
import {
  type Close,
  CountControl,
  EntriesControl,
  FactorsControl,
  InstrumentControl,
  MirrorByControl,
  MirrorOfControl,
  OneReadingControl,
  ProcessControl,
  ReadingControl,
  RotationsControl,
  SubjectControl,
} from './sentence-controls';

const LABELS: Record<Exclude<SentenceControl['kind'], 'field'>, string> = {
  process: 'Process',
  subject: 'Subject',
  count: 'Number of statements',
  entries: 'Entries',
  factors: 'Factors',
  reading: 'Reading',
  rotations: 'Rotation',
  before: 'First changed',
  'mirror-of': 'Section that is mirrored',
  'mirror-by': 'What is reversed',
  instrument: 'Instrument',
};

function Control({ section, control, close }: { section: Section; control: SentenceControl; close: Close }): ReactNode {
  if (control.kind === 'instrument') {
    const ids = section.kind === 'process' ? section.instruments : section.kind === 'free' ? section.lines.map((line) => line.instrument) : [];
    return <InstrumentControl section={section} index={control.index} ids={ids} />;
  }
  if (section.kind === 'mirror') return control.kind === 'mirror-of' ? <MirrorOfControl section={section} /> : <MirrorByControl section={section} />;
  if (section.kind !== 'process') return null;
  const { process } = section;
  switch (control.kind) {
    case 'process':
      return <ProcessControl section={section} />;
    case 'subject':
      return <SubjectControl section={section} close={close} />;
    case 'before':
      return <BeforeControl section={section} />;
    case 'entries':
      return <EntriesControl section={section} entries={'entries' in process ? process.entries : undefined} close={close} />;
    case 'field':
      return <FieldControl section={section} control={control} close={close} />;
    case 'reading':
      if (process.kind === 'proportion') return <ReadingControl section={section} process={process} />;
      return <OneReadingControl section={section} reading={'reading' in process ? process.reading : undefined} />;
  }
  if (process.kind !== 'proportion') return null;
  switch (control.kind) {
    case 'count':
      return <CountControl section={section} process={process} close={close} />;
    case 'factors':
      return <FactorsControl section={section} process={process} close={close} />;
    case 'rotations':
      return <RotationsControl section={section} process={process} close={close} />;
    default:
      return null;
  }
}

function Word({ part, section }: { part: SentencePart; section: Section }) {
  const { state } = useStudy();
  const { control, text } = part;
  if (control === undefined) return <>{text}</>;
  const colour = control.kind === 'instrument' ? { color: tint(state.study, control.instrument) } : undefined;
  return (
    <Token text={text} label={control.kind === 'field' ? control.label : LABELS[control.kind]} {...(colour ? { style: colour } : {})}>
      {(close) => <Control section={section} control={control} close={close} />}
    </Token>
  );
}

/** A word keeps its key, and so its open control, while the sentence about it grows or shrinks. */
function keyOf(section: Section, { control }: SentencePart, index: number): string {
  if (control === undefined) return `${section.id} text ${index}`;
  return `${section.id} ${control.kind}${control.kind === 'instrument' ? ` ${control.index}` : control.kind === 'field' ? ` ${control.field}` : ''}`;
}

/** The sentence of a section, its words the controls. */
export function ProcessSentence({ section }: { section: Section }) {
  const { state } = useStudy();
  return (
    <p data-testid="process-sentence" className="max-w-[46ch] font-serif text-[22px] leading-[1.62] sm:text-[25px]">
      {sectionSentence(state.study, section).map((part, index) => (
        <Word key={keyOf(section, part, index)} part={part} section={section} />
      ))}
    </p>
  );
}
