import { expect, test } from 'vitest';
import { shareOf } from './support/bundled.js';
import { REPRODUCE_TIMEOUT, reproduceBundled, REPRODUCED } from './support/reproduce-bundled.js';

test.each(shareOf(2))(
  '%s is sealed, and reproduced from its archive',
  async (name) => expect(await reproduceBundled(name)).toEqual({ ...REPRODUCED, name }),
  REPRODUCE_TIMEOUT,
);
