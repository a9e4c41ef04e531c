import { describe, expect, it } from 'vitest';
import { makeUploads, type Upload } from '@/features/library/uploads';

/** A request whose answer the test gives. */
class FakeRequest {
  status = 0;
  responseText = '';
  headers: Record<string, string> = {};
  sent: unknown = null;
  upload: { onprogress: ((event: { loaded: number; total: number }) => void) | null } = { onprogress: null };
  onload: (() => void) | null = null;
  onerror: (() => void) | null = null;
  onabort: (() => void) | null = null;
  open() {}
  setRequestHeader(name: string, value: string) {
    this.headers[name] = value;
  }
  send(body: unknown) {
    this.sent = body;
  }
  abort() {
    this.onabort?.();
  }
  answer(status: number, body: unknown) {
    this.status = status;
    this.responseText = typeof body === 'string' ? body : JSON.stringify(body);
    this.onload?.();
  }
}

const file = (name: string) => new File(['abc'], name);

const make = () => {
  const requests: FakeRequest[] = [];
  const assets: unknown[] = [];
  let list: readonly Upload[] = [];
  let ids = 0;
  const uploads = makeUploads({
    makeRequest: () => {
      const request = new FakeRequest();
      requests.push(request);
      return request as unknown as XMLHttpRequest;
    },
    newId: () => `u${ids++}`,
    onChange: (next) => {
      list = next;
    },
    onAsset: (asset) => assets.push(asset),
  });
  return { uploads, requests, assets, states: () => list.map(({ state }) => state), list: () => list };
};

describe('uploads', () => {
  it('sends two at once and the next when one is done', () => {
    const { uploads, requests, assets, states } = make();
    uploads.add([file('a'), file('b'), file('c')]);
    expect(states()).toEqual(['sending', 'sending', 'waiting']);
    requests[0]!.answer(201, { id: 'x' });
    expect(states()).toEqual(['done', 'sending', 'sending']);
    expect(assets).toEqual([{ id: 'x' }]);
  });

  it('sends the name so that any letter survives a header', () => {
    const { uploads, requests } = make();
    uploads.add([file('Küche – 100 %.png')]);
    expect(decodeURIComponent(requests[0]!.headers['x-file-name']!)).toBe('Küche – 100 %.png');
    expect(requests[0]!.headers['x-file-name']).toMatch(/^[\x20-\x7e]+$/);
  });

  it('tells how much is sent', () => {
    const { uploads, requests, list } = make();
    uploads.add([file('a')]);
    requests[0]!.upload.onprogress?.({ loaded: 1, total: 4 });
    expect(list()[0]!.share).toBe(0.25);
  });

  it('says a refusal in the words of the server and goes on with the next', () => {
    const { uploads, requests, list, states } = make();
    uploads.add([file('a'), file('b'), file('c')]);
    requests[0]!.answer(415, { detail: 'This is no picture.', mend: 'Send a PNG.' });
    expect(list()[0]!.fault).toBe('This is no picture. Send a PNG.');
    expect(states()).toEqual(['failed', 'sending', 'sending']);
  });

  it('says what happened when the answer is not ours or there is none', () => {
    const { uploads, requests, list } = make();
    uploads.add([file('a'), file('b')]);
    requests[0]!.answer(502, '<html>');
    requests[1]!.onerror?.();
    expect(list().map(({ fault }) => fault)).toEqual([
      'The server answered 502. Try again.',
      'The network broke off. Try again.',
    ]);
  });

  it('stops one on its way and one that waits, and frees the place', () => {
    const { uploads, requests, states } = make();
    uploads.add([file('a'), file('b'), file('c'), file('d')]);
    uploads.stop('u3');
    uploads.stop('u0');
    expect(states()).toEqual(['stopped', 'sending', 'sending', 'stopped']);
    requests[1]!.answer(201, {});
    requests[2]!.answer(201, {});
    expect(uploads.busy()).toBe(false);
  });

  it('sends the same file again when asked, and forgets only what rests', () => {
    const { uploads, requests, states } = make();
    uploads.add([file('a')]);
    uploads.forget('u0');
    expect(states()).toEqual(['sending']);
    requests[0]!.answer(500, {});
    uploads.again('u0');
    expect(requests[1]!.sent).toBe(requests[0]!.sent);
    requests[1]!.answer(500, {});
    uploads.forget('u0');
    expect(states()).toEqual([]);
  });

  it('fails, and does not hang, when a 201 carries something unreadable', () => {
    const { uploads, requests, states } = make();
    uploads.add([file('a')]);
    requests[0]!.answer(201, '<html>');
    expect(states()).toEqual(['failed']);
  });
});
