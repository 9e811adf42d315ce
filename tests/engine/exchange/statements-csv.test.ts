import { describe, expect, it } from 'vitest';
import { lockGates } from '@/db/demo/lock-gates';
import { type StudyInput, buildStudy, parseStudy, statementsCsv } from '@/engine';
import { writtenStudies } from '../../helpers/written-studies';

/** A reader of RFC 4180, section 2. */
function read(text: string): string[][] {
  const rows: string[][] = [[]];
  let cell = '';
  let isQuoted = false;
  for (let n = 0; n < text.length; n += 1) {
    const c = text[n]!;
    if (isQuoted) {
      if (c === '"' && text[n + 1] === '"') {
        cell += '"';
        n += 1;
      } else if (c === '"') isQuoted = false;
      else cell += c;
    } else if (c === '"') isQuoted = true;
    else if (c === ',') {
      rows.at(-1)!.push(cell);
      cell = '';
    } else if (c === '\r' && text[n + 1] === '\n') {
      rows.at(-1)!.push(cell);
      cell = '';
      rows.push([]);
      n += 1;
    } else cell += c;
  }
  return rows.slice(0, -1);
}

const csv = (document: StudyInput): string => {
  const study = parseStudy(document);
  return statementsCsv(study, buildStudy(study));
};

describe('the table of statements', () => {
  it('has a line for each statement and line of the demo, exact', () => {
    const text = csv(lockGates);
    expect(text.startsWith('\uFEFF')).toBe(true);
    const [head, ...rows] = read(text.slice(1));
    const column = (name: string): string[] => rows.map((row) => row[head!.indexOf(name)]!);
    expect(rows).toHaveLength(buildStudy(lockGates).statements.length);
    // 4 + 5 + 6 + 8 measures of 4/4 at quarter = 84: 4 × 4 × 60/84 = 11 3/7 seconds.
    expect(column('Length in measures').slice(0, 4)).toEqual(['4', '5', '6', '8']);
    expect(column('Starts, exact seconds').slice(0, 3)).toEqual(['0', '11 3/7', '25 5/7']);
    expect(column('Starts').slice(0, 3)).toEqual(['0:00.000', '0:11.429', '0:25.714']);
    expect(column('Factor').slice(0, 4)).toEqual(['1', '1 1/4', '1 1/2', '2']);
    expect(column('Player')[1]).toBe('Player 2');
  });

  it('can be opened by a spreadsheet: no cell is a formula or a date, and every row has every column', () => {
    for (const study of writtenStudies(40, 7)) {
      const [head, ...rows] = read(csv(study).slice(1));
      for (const row of rows) {
        expect(row).toHaveLength(head!.length);
        for (const cell of row) {
          expect(cell).not.toMatch(/^[=+\-@\t\r]/);
          expect(cell).not.toMatch(/^\d+\/\d+$/);
        }
      }
    }
  });

  it('keeps quotes, commas and line ends of names', () => {
    const name = 'a "b", c\r\nd';
    const [, ...rows] = read(csv({ ...lockGates, sections: lockGates.sections.map((section) => ({ ...section, name })) }).slice(1));
    expect(new Set(rows.map(([section]) => section))).toEqual(new Set([name]));
  });
});
