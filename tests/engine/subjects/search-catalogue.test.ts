import { describe, expect, it } from 'vitest';
import { CATALOGUE, attacks, formatRhythm, parseRhythm, retrograde, searchCatalogue } from '@/engine';

const names = (query: Parameters<typeof searchCatalogue>[0]) => searchCatalogue(query).map(({ name }) => name);

describe('searchCatalogue', () => {
  it('gives all for nothing asked, and nothing where a word is nowhere', () => {
    expect(searchCatalogue({})).toEqual([...CATALOGUE]);
    expect(searchCatalogue({ words: '  ' })).toEqual([...CATALOGUE]);
    expect(searchCatalogue({ words: 'tresillo zzz' })).toEqual([]);
  });

  it('minds neither accents nor capitals nor the kind of apostrophe, and wants every word', () => {
    expect(names({ words: 'DECI-TALA Vijaya' })).toEqual(['44 Vijayananda', '51 Vijaya']);
    expect(names({ words: 'Ragavardhana' })).toEqual(['93 Ragavardhana', 'Râgavardhana as Messiaen reads it']);
    expect(names({ words: "cooke's" })).toEqual(names({ words: 'Cooke’s' }));
    expect(names({ words: "cooke's" })).toHaveLength(3);
    expect(names({ words: 'aka' })).toEqual(['E(11,24), Aka']);
  });

  it('by number of attacks: those, and no others; rests are none', () => {
    for (const count of [1, 3, 8, 17]) {
      const found = searchCatalogue({ attacks: count });
      expect(found).toEqual(CATALOGUE.filter(({ rhythm }) => attacks(parseRhythm(rhythm)).length === count));
      expect(found.length).toBeGreaterThan(0);
    }
    expect(names({ words: 'clapping', attacks: 8 })).toEqual(['twelve-pulse clapping pattern']);
    expect(searchCatalogue({ words: 'clapping', attacks: 12 })).toEqual([]);
  });

  it('by palindrome: the same both ways or not, nothing twice', () => {
    const yes = searchCatalogue({ palindrome: true });
    const no = searchCatalogue({ palindrome: false });
    expect(yes.length + no.length).toBe(CATALOGUE.length);
    for (const { rhythm } of yes) expect(formatRhythm(retrograde(parseRhythm(rhythm), 'values'))).toBe(rhythm);
    for (const { rhythm } of no) expect(formatRhythm(retrograde(parseRhythm(rhythm), 'values'))).not.toBe(rhythm);
    expect(names({ words: 'nonretro', palindrome: true })).toHaveLength(3);
  });

  it('all at once', () => {
    expect(names({ words: 'foot', attacks: 3, palindrome: true })).toEqual(['tribrach', 'amphibrach', 'cretic, amphimacer', 'molossus']);
  });
});
