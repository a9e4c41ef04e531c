// @vitest-environment happy-dom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act } from 'react';
import { createRoot, type Root } from 'react-dom/client';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { newBody } from '#shared/scene/defaults';
import type { Scene } from '#shared/scene/schema';
import { useSaveScene } from '@/features/scenes/useSaveScene';
import { type SceneEditor, useSceneEditor } from '@/features/scenes/useSceneEditor';

const scene: Scene = {
  id: 's1',
  showId: 'night',
  name: 'Low tide',
  phaseId: null,
  energy: 4,
  position: 0,
  version: 3,
  body: newBody(),
};

type Seen = { editor: SceneEditor; saving: ReturnType<typeof useSaveScene> };
interface Call {
  method: string;
  path: string;
  body: Record<string, unknown> | null;
}

let root: Root;
let seen: Seen;
let calls: Call[];
let answer: (call: Call) => Response;

const Probe = () => {
  const editor = useSceneEditor(scene);
  seen = { editor, saving: useSaveScene(scene, editor) };
  return null;
};

const taken = (body: unknown, status = 200) => Response.json(body, { status });
const refused = () =>
  taken({ status: 409, title: 'Saved before', detail: 'Juno saved version 4.', mend: 'Load it.' }, 409);

beforeEach(async () => {
  vi.stubGlobal('IS_REACT_ACT_ENVIRONMENT', true);
  calls = [];
  vi.stubGlobal('fetch', async (path: string, init: { method: string; body?: string }) => {
    const call = { method: init.method, path, body: init.body ? JSON.parse(init.body) : null };
    calls.push(call);
    return answer(call);
  });
  const client = new QueryClient({ defaultOptions: { mutations: { retry: false } } });
  root = createRoot(document.createElement('div'));
  await act(async () =>
    root.render(
      <QueryClientProvider client={client}>
        <Probe />
      </QueryClientProvider>,
    ),
  );
});

afterEach(async () => {
  await act(async () => root.unmount());
  vi.unstubAllGlobals();
});

const rename = (name: string) => act(async () => seen.editor.edit({ ...seen.editor.draft, name }, null));
const save = () =>
  act(async () => void (await seen.saving.save.mutateAsync(seen.editor.draft).catch(() => 0)));

describe('saving a scene', () => {
  it('builds on the version that was opened, then on the one it made', async () => {
    answer = ({ body }) => taken({ ...scene, ...body, version: Number(body?.expectedVersion) + 1 });
    await rename('Ebb');
    expect(seen.editor.dirty).toBe(true);
    await save();
    expect(seen.editor.dirty).toBe(false);
    await rename('Flood');
    await save();
    expect(calls.map(({ body }) => [body?.name, body?.expectedVersion])).toEqual([
      ['Ebb', 3],
      ['Flood', 4],
    ]);
  });

  it('keeps what was made when somebody else was faster', async () => {
    answer = refused;
    await rename('Mine');
    await save();
    // The query library tells its hooks in a later task than the one that answers.
    await vi.waitFor(() =>
      act(async () => expect(seen.saving.conflict?.detail).toBe('Juno saved version 4.')),
    );
    expect(seen.editor.draft.name).toBe('Mine');
    expect(seen.editor.dirty).toBe(true);
  });

  it('loads theirs as one step that undo takes back, and saves over theirs after it', async () => {
    answer = refused;
    await rename('Mine');
    await save();
    answer = ({ method, body }) =>
      method === 'GET'
        ? taken({ ...scene, name: 'Theirs', version: 4 })
        : taken({ ...scene, ...body, version: 5 });
    await act(async () => void (await seen.saving.theirs.mutateAsync()));
    expect([seen.editor.draft.name, seen.editor.dirty, seen.saving.conflict]).toEqual([
      'Theirs',
      false,
      null,
    ]);
    await act(async () => seen.editor.undo());
    expect(seen.editor.draft.name).toBe('Mine');
    await save();
    expect(calls.at(-1)?.body).toMatchObject({ name: 'Mine', expectedVersion: 4 });
  });

  it('makes a copy of its own, with a name that fits, and no conflict is left', async () => {
    answer = refused;
    await rename('x'.repeat(60));
    await save();
    answer = ({ body }) => taken({ ...scene, ...body, id: 's2', version: 1 }, 201);
    await act(async () => void (await seen.saving.copy.mutateAsync(seen.editor.draft)));
    expect(calls.at(-1)).toMatchObject({ method: 'POST', path: '/api/shows/night/scenes' });
    expect(String(calls.at(-1)?.body?.name)).toMatch(/^x+ \(copy\)$/);
    expect(String(calls.at(-1)?.body?.name)).toHaveLength(60);
    expect([seen.editor.dirty, seen.saving.conflict]).toEqual([false, null]);
  });

  it('takes an older version into the draft, unsaved', async () => {
    answer = () => taken({ ...scene, version: 1, body: { ...newBody(), ground: '#123456' } });
    await act(async () => void (await seen.saving.take.mutateAsync(1)));
    expect([seen.editor.draft.body.ground, seen.editor.dirty, seen.editor.version]).toEqual([
      '#123456',
      true,
      3,
    ]);
  });
});
