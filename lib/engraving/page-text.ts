import type { TextStyle } from './text';

export const NAME_TEXT: TextStyle = { size: 15 };
export const TITLE_TEXT: TextStyle = { size: 40, weight: 'bold' };
export const COMPOSER_TEXT: TextStyle = { size: 18 };
export const HEADING_TEXT: TextStyle = { size: 16, weight: 'bold' };
export const BODY_TEXT: TextStyle = { size: 15 };
export const FOOT_TEXT: TextStyle = { size: 11.5 };
