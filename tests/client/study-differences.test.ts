import { describe, expect, test } from 'vitest';
import { demoStudies } from '@/db/demo';
import { type Study, parseStudy } from '@/engine';
import { differencesOf } from '@/lib/client/study-differences';
import { addSection, moveSection, setFactors, setSubject, setTempo, setTitle, type Edit } from '@/lib/client/study-edits';

const mine = parseStudy(demoStudies[0]!.study);
const changed = (...edits: Edit[]): Study => edits.reduce((study, edit) => parseStudy(edit(study)), mine);

describe('differencesOf', () => {
  test('the same study does not differ', () => expect(differencesOf(mine, changed())).toEqual([]));

  test('names what differs, mine beside theirs', () => {
    const found = differencesOf(mine, changed(setTitle('Weir'), setTempo('1/4', '96'), setFactors('filling', ['1', '2'])));
    expect(found.map(({ what }) => what)).toEqual(['Title', 'Tempo', 'Section “Filling”', 'Section “Emptying”', 'Length']);
    expect(found[0]).toEqual({ what: 'Title', mine: 'Lock Gates', theirs: 'Weir' });
    expect(found[2]!.theirs).toContain('is stated twice');
  });

  test('a section that one of them lacks, and an order', () => {
    const found = differencesOf(mine, changed(addSection('free', 'pound'), moveSection('sluice', -1)));
    expect(found.map(({ what }) => what)).toEqual(['Section “New episode”', 'Order of sections', 'Length']);
    expect(found[0]!.mine).toBe('not there');
  });

  test('a subject', () => {
    const found = differencesOf(mine, changed(setSubject('s', { rhythm: '1 1 1 1' })));
    expect(found[0]!.what).toBe('Subject “Subject”');
  });
});
