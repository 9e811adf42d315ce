import { describe, expect, it } from 'vitest';
import { lockGates } from '@/db/demo/lock-gates';
import { type Study, buildStudy, parseStudy } from '@/engine';
import * as edits from '@/lib/client/print-edits';
import { differencesOf } from '@/lib/client/study-differences';
import { type Edit, removeInstrument } from '@/lib/client/study-edits';

const begin = parseStudy(lockGates);
const after = (...list: Edit[]): Study =>
  list.reduce((study, edit) => {
    const next = parseStudy(edit(study));
    buildStudy(next);
    return next;
  }, begin);

describe('players', () => {
  it('are added with an id of their own, named, moved and removed', () => {
    const study = after(edits.addPlayer('Player 1'), edits.renamePlayer('p1', 'First'), edits.movePlayer('p1', 1), edits.removePlayer('p4'));
    expect(study.players.map(({ id, name }) => [id, name])).toEqual([['p2', 'Player 2'], ['p1', 'First'], ['p3', 'Player 3'], ['player-1', 'Player 1']]);
    expect(() => edits.addPlayer(' ')(begin)).toThrow(/name/);
  });
  it('play instruments in the order of the score, shared or not', () => {
    const study = after(edits.setPlays('p1', 'log-drum', true), edits.setPlays('p1', 'crotales', false));
    expect(study.players[0]!.instruments).toEqual(['log-drum', 'wood-block']);
    expect(study.players[2]!.instruments).toContain('log-drum');
  });
  it('are given to instruments that nobody plays, to those only', () => {
    const study = after(edits.removePlayer('p1'), edits.playersForAll());
    expect(study.players.slice(3).map(({ instruments }) => instruments)).toEqual([['crotales'], ['wood-block']]);
    expect(new Set(study.players.map(({ id }) => id)).size).toBe(study.players.length);
  });
  it('follow an instrument that is removed', () => {
    const study = after((one) => ({ ...one, instruments: [...one.instruments, { id: 'x', name: 'X', family: 'wood' as const }] }), edits.setPlays('p1', 'x', true), removeInstrument('x'));
    expect(study.players[0]!.instruments).toEqual(['crotales', 'wood-block']);
  });
});

describe('what is printed about the notes', () => {
  it('is set, and is no longer there where it is emptied', () => {
    const set = after(edits.setComposer(' A. Name '), edits.setRights('© A. Name'), edits.setDynamics('pound', ' p < f '), edits.setStatementDynamics('filling', 'p; ; f > p'), edits.setFermata('pound', true), edits.setLineDynamics('sluice', 0, 'pp'), edits.setLineMarks('sluice', 0, [{ attack: 2, ends: 'choke' }]), edits.setSubjectMarks('s', [{ attack: 0, ends: 'let-ring' }]));
    const pound = set.sections.find(({ id }) => id === 'pound')!;
    expect([set.composer, set.rights, pound.dynamics, pound.fermata]).toEqual(['A. Name', '© A. Name', 'p < f', true]);
    expect(set.sections.find(({ id }) => id === 'filling')).toMatchObject({ statementDynamics: ['p', '', 'f > p'] });
    expect(differencesOf(begin, set).map(({ what }) => what)).toEqual(['Composer', 'Rights', 'Subject “Subject”', 'Section “Filling”', 'Section “Sluice”', 'Section “Pound”']);
    const emptied = [edits.setComposer(''), edits.setRights(''), edits.setDynamics('pound', ''), edits.setStatementDynamics('filling', ' ; '), edits.setFermata('pound', false), edits.setLineDynamics('sluice', 0, ''), edits.setLineMarks('sluice', 0, []), edits.setSubjectMarks('s', [])].reduce((study, edit) => parseStudy(edit(study)), set);
    for (const field of ['composer', 'rights']) expect(field in emptied).toBe(false);
    expect(emptied.sections.find(({ id }) => id === 'pound')).not.toHaveProperty('dynamics');
    expect(emptied.sections.find(({ id }) => id === 'filling')).not.toHaveProperty('statementDynamics');
    expect(emptied.subjects[0]).not.toHaveProperty('marks');
  });
  it('a mark replaces the one before on its attack', () => {
    const marks = edits.withMark([{ attack: 3, ends: 'choke' }, { attack: 5, ends: 'let-ring' }], 3, 'let-ring');
    expect(marks).toEqual([{ attack: 3, ends: 'let-ring' }, { attack: 5, ends: 'let-ring' }]);
    expect(edits.withMark(marks, 3, null)).toEqual([{ attack: 5, ends: 'let-ring' }]);
  });
});
