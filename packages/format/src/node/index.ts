export { filesBeside, filesInFolder } from './folder-files.js';
export { createNodeSha256 } from './node-sha256.js';
export { filesOfFolder } from './package-folder.js';
