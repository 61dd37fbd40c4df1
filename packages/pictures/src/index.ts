export { bracket, type BracketData, type BracketEnd, type BracketRow } from './bracket/bracket.js';
export { descent, type DescentData } from './descent/descent.js';
export { relief } from './relief/relief.js';
export type { ReliefData, ReliefField } from './relief/relief-data.js';
export { spectrum, type SpectrumData } from './spectrum/spectrum.js';
export { classRules, pictureStyle } from './svg/palette.js';
export type { PictureOptions } from './svg/picture.js';
