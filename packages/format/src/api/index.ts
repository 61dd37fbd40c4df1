export * from './version-schema.js';
