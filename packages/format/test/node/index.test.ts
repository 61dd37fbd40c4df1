import { expect, it } from 'vitest';
import * as node from '../../src/node/index.js';

it('exports these names', () => {
  expect(Object.keys(node).sort()).toEqual(['createNodeSha256', 'filesBeside', 'filesInFolder', 'filesOfFolder']);
});
