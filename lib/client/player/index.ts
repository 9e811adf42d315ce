export { StudyPlayer, type Place, type PlayOptions, type PlayerOptions } from './player';
export { PLAYER } from './settings';
export type { PlayerState, PlayerStatus } from './store';
export type { Voice } from './bank';
export { NAMED_SOUNDS, renderSound, resolveSound, soundKey, type SoundRequest } from './sounds';
export { STROKES_PER_SECOND, strokesOf, Timeline, type Passage, type StrokePlan } from './schedule';
