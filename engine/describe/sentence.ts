import { rulesOf } from '../process/registry';
import type { FreeSection, MirrorSection, ProcessSection, Section, Study } from '../study/schema';
import { type SentencePart, instrumentParts, plain, word } from './sentence-parts';

const processParts = (study: Study, section: ProcessSection): SentencePart[] => rulesOf(section.process).sentence({ study, section, process: section.process });

function freeParts(study: Study, section: FreeSection): SentencePart[] {
  if (section.lines.length === 0) return [plain('No subject here, and nothing is played yet.')];
  const ids = section.lines.map(({ instrument }) => instrument);
  return [plain('No subject here: '), ...instrumentParts(study, ids), plain(ids.length === 1 ? ' alone.' : ' together.')];
}

function mirrorParts(study: Study, section: MirrorSection): SentencePart[] {
  const of = study.sections.find(({ id }) => id === section.of)?.name ?? section.of;
  return [
    word(`“${of}”`, 'mirror-of'),
    plain(' is played from its end, '),
    word(section.by === 'attacks' ? 'its attacks reversed' : 'its values reversed', 'mirror-by'),
    plain('.'),
  ];
}

/** The process sentence of a section, in parts: those with a `control` can be changed. */
export function sectionSentence(study: Study, section: Section): SentencePart[] {
  const main =
    section.kind === 'process' ? processParts(study, section) : section.kind === 'free' ? freeParts(study, section) : mirrorParts(study, section);
  const under = section.under ?? [];
  if (under.length === 0) return main;
  const ids = under.map(({ instrument }) => instrument);
  const parts = instrumentParts(study, ids).map(({ text }) => ({ text }));
  return [...main, plain(' Under it: '), ...parts, plain('.')];
}
