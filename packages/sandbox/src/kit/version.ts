/** Version of the kit, by Semantic Versioning: within a major version no function changes a bit of what it returns. */
export const KIT_VERSION = '1.0.0';
