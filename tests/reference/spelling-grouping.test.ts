import { describe, expect, it } from 'vitest';
import { beamed, spelled } from '../engine/notation/shorthand';

type Row = readonly [metre: string, rhythm: string, written: string];
const write = (rows: readonly Row[]) => it.each(rows)('%s: %s', (metre, rhythm, written) => expect(spelled(rhythm, metre)).toBe(written));

/** Berklee Online, “Imaginary bar lines” (online.berklee.edu/takenote/imaginary-barlines). */
describe('the middle of 4/4 stays visible (Berklee Online, Imaginary bar lines)', () => {
  write([
    // A dotted quarter on beat 2 spans 1/4 to 5/8, and so is a quarter tied to an eighth on beat 3.
    ['4/4', '1/4 3/8 3/8', 'q q~ e e~ q'],
    // A quarter on the second eighth spans 1/8 to 3/8: it does not reach beat 3.
    ['4/4', '1/8 1/4 1/8 1/4 1/4', 'e q e q q'],
    // Only whole, half and dotted half notes may straddle it, unsyncopated or as quarter, half, quarter.
    ['4/4', '1', 'w'],
    ['4/4', '3/4 1/4', 'h. q'],
    ['4/4', '1/4 3/4', 'q h.'],
    ['4/4', '1/4 1/2 1/4', 'q h q'],
    ['4/4', '1/8 1/2 3/8', 'e e~ q~ e e~ q'],
    ['4/4', '3/8 5/8', 'q. e~ h'],
    ['4/4', '1/8 3/4 1/8', 'e e~ q~ q. e'],
  ]);
  it('no beam crosses it, nor beats 2 and 3 (Berklee; devsite13.co.uk, grouping and beaming)', () => {
    expect(beamed('1/8 1/8 1/8 1/8 1/8 1/8 1/8 1/8', '4/4')).toBe('[ ] [ ] [ ] [ ]');
    expect(beamed('1/4 1/8 1/8 1/8 1/8 1/4', '4/4')).toBe('. [ ] [ ] .');
  });
});

/** C. A. Harris, How to Write Music (1917), 17-18, fig. 8. */
describe('compound measures (Harris, How to Write Music, 1917, 17-18)', () => {
  write([
    // “A beat and a third”: a dotted quarter tied to an eighth, never a half note.
    ['6/8', '1/2 1/4', 'q.~ e q'],
    ['6/8', '1/4 1/2', 'q e~ q.'],
    // Silence in 6/8 by beats.
    ['6/8', '(3/4)', '(q.) (q.)'],
    // 12/16 as four dotted eighths.
    ['12/16', '3/16 3/16 3/16 3/16', 'e. e. e. e.'],
    ['9/8', '3/8 3/8 3/8', 'q. q. q.'],
  ]);
  it('T16: one sound through 6/8 is a dotted half, as later practice has it (from memory); Harris would tie two dotted quarters', () => {
    expect(spelled('3/4', '6/8')).toBe('h.');
  });
});

/** A grade-4 page on rests (dev-musictheoryonline.spindogs-dev7.co.uk/lesson/grade-4-rests); Harris, p. 18. */
describe('rests (grade-4 page on rests; devsite13.co.uk)', () => {
  describe('in simple time each beat has its own; two beats only as the first or second half of four', () => {
    write([
      ['4/4', '(1)', '(w)'],
      ['4/4', '(1/2) 1/2', '(h) h'],
      ['4/4', '1/2 (1/2)', 'h (h)'],
      ['4/4', '1/4 (1/2) 1/4', 'q (q) (q) q'],
      ['4/4', '(3/4) 1/4', '(h) (q) q'],
      ['4/4', '1/4 (3/4)', 'q (q) (h)'],
      ['3/4', '1/4 (1/2)', 'q (q) (q)'],
      ['3/4', '(1/2) 1/4', '(q) (q) q'],
      ['4/2', '(2)', '(b)'],
    ]);
  });
  describe('below a beat from short to long, without dots', () => {
    write([
      ['4/4', '1/8 (3/8) 1/2', 'e (e) (q) h'],
      ['4/4', '1/16 (3/16) 3/4', 's (s) (e) h.'],
      ['4/4', '3/16 (1/16) 3/4', 'e. (s) h.'],
    ]);
  });
  describe('in compound time a beat is a dotted quarter; first two eighths a quarter, last two apart; half of 12/8 a dotted half', () => {
    write([
      ['6/8', '(3/8) 3/8', '(q.) q.'],
      ['6/8', '(1/4) 1/8 3/8', '(q) e q.'],
      ['6/8', '1/8 (1/4) 3/8', 'e (e) (e) q.'],
      ['12/8', '(3/4) 3/4', '(h.) h.'],
      ['12/8', '3/8 (3/4) 3/8', 'q. (q.) (q.) q.'],
    ]);
  });
});

/** devsite13.co.uk, grouping and beaming; spider.georgetowncollege.edu, MUS111. */
describe('beams: one group a beat, in compound time never longer than a beat (devsite13.co.uk; Georgetown MUS111)', () => {
  it.each([
    ['3/4', '1/8 1/8 1/8 1/8 1/8 1/8', '[ ] [ ] [ ]'],
    ['6/8', '1/8 1/8 1/8 1/8 1/8 1/8', '[ - ] [ - ]'],
    ['9/8', '1/8 1/8 1/8 1/8 1/8 1/8 1/8 1/8 1/8', '[ - ] [ - ] [ - ]'],
    ['4/4', '1/16 1/16 1/16 1/16 1/8 1/8 3/16 1/16 1/4', '[[ -- -- ]] [ ] [ ]< .'],
    ['4/4', '1/16 3/16 3/4', '[> ] .'],
    // additive metres by their groups (common practice, no source)
    ['3+2+2/8', '1/8 1/8 1/8 1/8 1/8 1/8 1/8', '[ - ] [ ] [ ]'],
    ['2+2+3/8', '1/8 1/8 1/8 1/8 1/8 1/8 1/8', '[ ] [ ] [ - ]'],
    ['5/8', '1/8 1/8 1/8 1/8 1/8', '[ - ] [ ]'],
  ])('%s: %s', (metre, rhythm, beams) => expect(beamed(rhythm, metre)).toBe(beams));
  it('ties and beams do not stand for one another: a tied eighth over the beat is not beamed over it', () => {
    expect([spelled('3/8 5/8', '4/4'), beamed('3/8 5/8', '4/4')]).toEqual(['q. e~ h', '. . .']);
    expect([spelled('3/16 5/16 1/2', '4/4'), beamed('3/16 5/16 1/2', '4/4')]).toEqual(['e. s~ q h', '[ ]< . .']);
  });
});

describe('additive metres show their groups (common practice, no source)', () => {
  write([
    ['3+2+2/8', '3/8 1/4 1/4', 'q. q q'],
    ['3+2+2/8', '5/8 1/4', 'q.~ q q'],
    ['3+2+2/8', '7/8', 'q.~ h'],
    ['2+2+3/8', '1/2 3/8', 'h q.'],
    ['5/4', '5/4', 'h.~ h'],
    ['3+2/8', '(3/8) 1/4', '(q.) q'],
    ['5/8', '(5/8)', '(q.) (q)'],
  ]);
});

describe('T8 (check values): augmented values are grouped afresh where they come to stand', () => {
  write([
    ['4/4', '9/16 7/16', 'h~ s e.~ q'],
    ['4/4', '15/32 5/32 5/16 1/16', 'q~ e.. t~ e e~ e. s'],
    // held over the bar line
    ['4/4', '3/4 3/4 1/2', 'h. q~ | h h'],
    ['4/4', '7/8 7/8 1/4', 'h~ q. e~ | h. q'],
  ]);
  it('a change of metre begins a new measure, and what is cut short stands in a metre of its own', () => {
    const plan = [{ at: 0, metre: '4/4' }, { at: '5/4', metre: '6/8' }];
    expect(spelled('1/2 1/2 1/4 3/8 3/8', plan)).toBe('h h | q | q. q.');
    expect(spelled('1/2 3/4 3/4', plan)).toBe('h h~ | q | h.');
  });
});
