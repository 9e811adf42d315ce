'use client';

import { attacks, formatFraction, measuresOf, parseRhythm, totalLength } from '@/engine';
import { setSubjectMarks } from '@/lib/client/print-edits';
import { setSubject } from '@/lib/client/study-edits';
import { attempt, useStudy } from './context';
import { MarksControl } from './marks-control';
import { RhythmField } from './rhythm-field';

/** The subject of the chosen section, as text and on the staff. */
export function SubjectPanel() {
  const { editor, state, selection } = useStudy();
  const { study } = state;
  const section = study.sections.find(({ id }) => id === selection.section);
  const wanted = section?.kind === 'process' ? section.subject : undefined;
  const subject = study.subjects.find(({ id }) => id === wanted) ?? study.subjects[0];
  if (!subject) return null;
  const rhythm = parseRhythm(subject.rhythm);
  const length = totalLength(rhythm);
  const users = study.sections.filter((one) => one.kind === 'process' && one.subject === subject.id).map(({ name }) => name);
  return (
    <section aria-labelledby="subject-heading" className="mt-10 min-w-0">
      <h2 id="subject-heading" className="mb-2.5 text-[15px] font-semibold">
        {study.subjects.length > 1 ? `Subject: ${subject.name}` : 'Subject'}
      </h2>
      <RhythmField
        key={subject.id}
        field={`subjects.${subject.id}`}
        label="Lengths in whole notes; rests in round brackets; > accent, ^ strong accent, /// roll, @2 second sound"
        value={subject.rhythm}
        metre={study.metre}
        onTry={(text) => attempt(editor, () => setSubject(subject.id, { rhythm: text }))}
      />
      <p className="mt-1 text-[13px] text-soft">
        {`${rhythm.length} values, ${attacks(rhythm).length} attacks, ${formatFraction(length)} whole notes = ${measuresOf(length, study.metre).toFraction(true)} measures of ${study.metre}.`}
        {users.length > 1 && ` Stated in ${users.join(', ')}.`}
      </p>
      <p className="mt-1 text-[13.5px] text-soft">
        <MarksControl rhythm={subject.rhythm} marks={subject.marks} label="How attacks of the subject end" set={(marks) => setSubjectMarks(subject.id, marks)} />
      </p>
    </section>
  );
}
