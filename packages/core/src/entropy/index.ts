export { entropyProduction } from './entropy-production.js';
export { relativeEntropy, vonNeumannEntropy } from './relative-entropy.js';
