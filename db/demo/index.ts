import type { StudyInput } from '../../engine';
import { footbridge } from './footbridge';
import { lockGates } from './lock-gates';
import { threeFerries } from './three-ferries';

export type DemoStudy = { readonly slug: string; readonly summary: string; readonly study: StudyInput };

/** The studies that anyone can open. All are invented. */
export const demoStudies: readonly DemoStudy[] = [
  { slug: 'lock-gates', summary: 'One subject at 1, 5/4, 3/2 and 2 times its length; the outer sections mirror about the middle.', study: lockGates },
  { slug: 'three-ferries', summary: 'A canon at three speeds that ends together, triplets and quintuplets, and a return by attacks.', study: threeFerries },
  { slug: 'footbridge', summary: 'An additive metre, tom-toms with four sounds, rotation, and attacks that run backwards.', study: footbridge },
];
