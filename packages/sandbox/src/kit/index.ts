export { kit } from './kit.js';
