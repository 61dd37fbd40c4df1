import type { Verb } from '../verb.js';
import { downloadEffect } from './effect.js';
import { planDownload, type DownloadPlan } from './plan.js';

export const verb: Verb<DownloadPlan> = { plan: planDownload, effect: downloadEffect };
