import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertMember } from '../src/members/member-store.js';
import { exampleArchive } from './support/example-archive.js';
import { type TestRegistry, testRegistry } from './support/test-registry.js';

let registry: TestRegistry;
const tokens = new Map<string, string>();

beforeAll(async () => {
  registry = await testRegistry();
  for (const name of ['mira', 'oskar']) tokens.set(name, (await registry.addMember(name)).token);
  for (let k = 0; k < 5; k++) await publish('mira', { name: `chain-${k}`, title: `Chain number ${k}` });
  await publish('mira', { name: 'chain-0', version: '1.1.0', title: 'Chain number 0, mended' });
  await publish('oskar', {
    name: 'thermal-bath',
    title: 'A qubit in a bath',
    summary: 'Two levels.',
    keywords: ['Davies'],
  });
});
afterAll(() => registry.close());

async function publish(owner: string, changes: Record<string, unknown>): Promise<void> {
  const answer = await registry.http
    .post(`/api/v1/examples/${owner}/${String(changes['name'])}/versions`)
    .set('Authorization', `Bearer ${tokens.get(owner) ?? ''}`)
    .set('Idempotency-Key', JSON.stringify(changes).replaceAll(/[^\w]/g, '-'))
    .field('listed', 'true')
    .attach('archive', Buffer.from(exampleArchive(changes)), 'example.zip');
  expect(answer.status).toBe(201);
}

interface Page {
  readonly examples: readonly { readonly example: string; readonly version: string }[];
  readonly next: string | null;
}

async function browse(query: string): Promise<Page & { link: string | undefined }> {
  const answer = await registry.http.get(`/api/v1/examples${query}`);
  expect(answer.status).toBe(200);
  return { ...(answer.body as Page), link: answer.headers['link'] as string | undefined };
}

const names = (page: Page): string[] => page.examples.map(({ example, version }) => `${example}@${version}`);

describe('browsing', () => {
  it('shows the newest version of each example, newest first', async () => {
    expect(names(await browse(''))).toEqual([
      'oskar/thermal-bath@1.0.0',
      'mira/chain-0@1.1.0',
      'mira/chain-4@1.0.0',
      'mira/chain-3@1.0.0',
      'mira/chain-2@1.0.0',
      'mira/chain-1@1.0.0',
    ]);
  });

  it('goes from page to page without a gap', async () => {
    const seen: string[] = [];
    for (let query = '?count=2'; ;) {
      const page = await browse(query);
      seen.push(...names(page));
      if (page.next === null) break;
      expect(page.link).toBe(`</api/v1/examples?count=2&cursor=${page.next}>; rel="next"`);
      query = `?count=2&cursor=${page.next}`;
    }
    expect(seen).toEqual(names(await browse('')));
  });

  it('finds words and owners', async () => {
    expect(names(await browse('?words=davies'))).toEqual(['oskar/thermal-bath@1.0.0']);
    expect(names(await browse('?words=mended'))).toEqual(['mira/chain-0@1.1.0']);
    expect(names(await browse('?words=chain%20-mended'))).toHaveLength(4);
    expect(names(await browse('?owner=oskar'))).toEqual(['oskar/thermal-bath@1.0.0']);
    expect(names(await browse("?words=');drop%20table%20versions;--"))).toEqual([]);
  });

  it.each([
    ['?cursor=nothing', 'bad-cursor'],
    ['?count=0', 'bad-query'],
    ['?count=101', 'bad-query'],
    ['?colour=red', 'bad-query'],
    ['?owner=a&owner=b', 'bad-query'],
    ['?access_token=x', 'bad-query'],
  ])('refuses %s', async (query, code) => {
    const answer = await registry.http.get(`/api/v1/examples${query}`);
    expect(answer.body).toMatchObject({ status: 400, code });
  });
});

describe('one example', () => {
  it('has its history, newest version first', async () => {
    const answer = await registry.http.get('/api/v1/examples/mira/chain-0');
    expect(answer.body).toMatchObject({ versions: [{ version: '1.1.0' }, { version: '1.0.0' }] });
  });

  it('has its files', async () => {
    const path = '/api/v1/examples/mira/chain-1/versions/1.0.0';
    const answer = await registry.http.get(path);
    const { files } = answer.body as { files: { path: string }[] };
    expect(files.map((file) => file.path)).toEqual(['LICENSE', 'NOTES.md', 'example.json', 'generate.js']);
    const notes = await registry.http.get(`${path}/files/NOTES.md`);
    expect(String(notes.body)).toBe('# Two points\n');
    expect(notes.headers['content-disposition']).toBe('attachment; filename="NOTES.md"');
    expect(notes.headers['content-security-policy']).toBe('sandbox');
    expect((await registry.http.get(`${path}/files/evidence/none.json`)).status).toBe(404);
  });

  it('is withdrawn by its owner alone, once, and stays readable', async () => {
    const path = '/api/v1/examples/mira/chain-3/versions/1.0.0';
    const send = (as: string, body: object) =>
      registry.http
        .post(`${path}/withdrawal`)
        .set('Authorization', `Bearer ${tokens.get(as) ?? ''}`)
        .send(body);
    expect((await send('oskar', { because: 'not mine' })).status).toBe(403);
    expect((await send('mira', { because: '' })).body).toMatchObject({
      status: 422,
      errors: [{ pointer: '/because' }],
    });
    expect((await send('mira', { because: 'wrong', role: 'x' })).status).toBe(422);
    const done = await send('mira', { because: 'a rate has the wrong sign' });
    expect(done.body).toMatchObject({ withdrawn: { because: 'a rate has the wrong sign' } });
    expect((await send('mira', { because: 'again' })).status).toBe(409);
    expect(names(await browse(''))).not.toContain('mira/chain-3@1.0.0');
    expect((await registry.http.get(`${path}/archive`)).status).toBe(200);
  });
});

describe('the server', () => {
  it('says that it lives and that it is ready', async () => {
    expect((await registry.http.get('/livez')).status).toBe(200);
    expect((await registry.http.get('/readyz')).status).toBe(200);
  });

  it('answers what is not there with a problem', async () => {
    const answer = await registry.http.get('/api/v1/nothing');
    expect(answer.headers['content-type']).toContain('application/problem+json');
    expect(answer.body).toMatchObject({ status: 404, code: 'not-found' });
  });
});

describe('members', () => {
  it.each([
    ['oskar', 'choose another'],
    ['Mira X', 'choose such a one'],
    ['a', 'choose such a one'],
    ['a--b', 'choose such a one'],
  ])('are refused under the name %s', async (name, says) => {
    await expect(insertMember(registry.owner, { name, fullName: 'Somebody' })).rejects.toThrow(says);
  });
});
