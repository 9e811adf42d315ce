import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { distinctNames, fileName } from '@/lib/file-names';

describe('the name of a file', () => {
  it.each([
    [['Lock Gates'], 'pdf', 'Lock Gates.pdf'],
    [['Lock Gates', 'Player 1'], 'pdf', 'Lock Gates - Player 1.pdf'],
    [['Lock Gates', ''], 'mxl', 'Lock Gates.mxl'],
    [['Плотина – Ωmega 水門'], 'json', 'Плотина – Ωmega 水門.json'],
    [['../../etc/passwd'], 'pdf', 'etc passwd.pdf'],
    [['a\r\nSet-Cookie: x'], 'pdf', 'a Set-Cookie x.pdf'],
    [['"; filename="x.exe'], 'pdf', '; filename= x.exe.pdf'],
    [['\u202Efdp.exe'], 'pdf', 'fdp.exe.pdf'],
    [['...'], 'pdf', 'Study.pdf'],
    [['   '], 'pdf', 'Study.pdf'],
    [['con'], 'zip', 'Study con.zip'],
    [['x'.repeat(300)], 'pdf', `${'x'.repeat(100)}.pdf`],
  ])('from %j as %s is %j', (parts, extension, name) => {
    expect(fileName(parts, extension)).toBe(name);
  });

  it('is one that any system takes, whatever it holds', () => {
    fc.assert(
      fc.property(fc.array(fc.string({ unit: 'binary' }), { maxLength: 3 }), (parts) => {
        const name = fileName(parts, 'pdf');
        expect(name).toMatch(/^[^\u0000-\u001f"*/:<>?\\|.][^\u0000-\u001f"*/:<>?\\|]*\.pdf$/u);
        expect([...name].length).toBeLessThanOrEqual(110);
      }),
    );
  });

  it('is another for each file of a zip', () => {
    expect(distinctNames(['Bells.pdf', 'bells.pdf', 'Drums.pdf', 'Bells.pdf'])).toEqual(['Bells.pdf', 'bells (2).pdf', 'Drums.pdf', 'Bells (3).pdf']);
  });
});
