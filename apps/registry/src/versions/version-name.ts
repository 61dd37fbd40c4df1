/** A version as addresses name it. */
export interface VersionName {
  readonly owner: string;
  readonly slug: string;
  readonly version: string;
}

type Parameters = Readonly<Record<string, string | string[] | undefined>>;

/** The name in the address of a route with `:owner/:slug/…/:version`. */
export function versionName(parameters: Parameters): VersionName {
  return { owner: text(parameters['owner']), slug: text(parameters['slug']), version: text(parameters['version']) };
}

/** What a `*path` of a route stands for, with slashes. */
export function pathOf(parameters: Parameters): string {
  const { path } = parameters;
  return Array.isArray(path) ? path.join('/') : text(path);
}

/** `owner/slug@version`. */
export function nameText({ owner, slug, version }: VersionName): string {
  return `${owner}/${slug}@${version}`;
}

function text(value: string | string[] | undefined): string {
  return typeof value === 'string' ? value : '';
}
