import type { Verb } from '../verb.js';
import { certifyEffect } from './effect.js';
import { planCertify, type CertifyPlan } from './plan.js';

export const verb: Verb<CertifyPlan> = { plan: planCertify, effect: certifyEffect };
