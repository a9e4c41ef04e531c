import type { Asset } from '#shared/api/assets';
import type { Problem } from '#shared/api/problem';

/** One file on its way. */
export interface Upload {
  id: string;
  name: string;
  bytes: number;
  state: 'waiting' | 'sending' | 'done' | 'failed' | 'stopped';
  /** Share sent, 0..1. */
  share: number;
  /** Why it failed, and what to do, in sentences. */
  fault: string | null;
}

export interface UploadParts {
  makeRequest: () => XMLHttpRequest;
  newId: () => string;
  /** The list has changed. */
  onChange: (uploads: readonly Upload[]) => void;
  /** The server has a file more. */
  onAsset: (asset: Asset) => void;
}

/** More at once would only slow each other down. */
const atOnce = 2;

const faultOf = (request: XMLHttpRequest): string => {
  try {
    const { detail, mend } = JSON.parse(request.responseText) as Partial<Problem>;
    if (detail) return `${detail} ${mend ?? ''}`.trim();
  } catch {
    // No problem details: something between us and the server answered.
  }
  return request.status === 0
    ? 'The network broke off. Try again.'
    : `The server answered ${request.status}. Try again.`;
};

/** The new file; null when something between us and the server made the answer unreadable. */
const assetOf = (request: XMLHttpRequest): Asset | null => {
  try {
    return JSON.parse(request.responseText) as Asset;
  } catch {
    return null;
  }
};

/** Sends files one after the other, two at once; each can be stopped, and tried again. */
export function makeUploads({ makeRequest, newId, onChange, onAsset }: UploadParts) {
  let list: readonly Upload[] = [];
  const files = new Map<string, File>();
  const requests = new Map<string, XMLHttpRequest>();

  const change = (id: string, to: Partial<Upload>) => {
    list = list.map((upload) => (upload.id === id ? { ...upload, ...to } : upload));
    onChange(list);
  };
  const next = () => {
    const free = atOnce - requests.size;
    for (const upload of list.filter(({ state }) => state === 'waiting').slice(0, Math.max(0, free)))
      send(upload);
  };
  const finish = (id: string, to: Partial<Upload>) => {
    requests.delete(id);
    if (to.state === 'done') files.delete(id);
    change(id, to);
    next();
  };
  const send = ({ id, name }: Upload) => {
    const file = files.get(id);
    if (!file) return;
    const request = makeRequest();
    requests.set(id, request);
    change(id, { state: 'sending', share: 0, fault: null });
    request.open('POST', '/api/assets');
    // Always the same type: a .json file must not be read as a form of ours.
    request.setRequestHeader('content-type', 'application/octet-stream');
    request.setRequestHeader('x-file-name', encodeURIComponent(name));
    request.upload.onprogress = ({ loaded, total }) => change(id, { share: total > 0 ? loaded / total : 0 });
    request.onload = () => {
      const asset = request.status === 201 ? assetOf(request) : null;
      if (asset) {
        onAsset(asset);
        finish(id, { state: 'done', share: 1 });
      } else finish(id, { state: 'failed', fault: faultOf(request) });
    };
    request.onerror = () => finish(id, { state: 'failed', fault: faultOf(request) });
    request.onabort = () => finish(id, { state: 'stopped', fault: null });
    request.send(file);
  };
  return {
    add: (added: readonly File[]) => {
      for (const file of added) {
        const id = newId();
        files.set(id, file);
        list = [...list, { id, name: file.name, bytes: file.size, state: 'waiting', share: 0, fault: null }];
      }
      onChange(list);
      next();
    },
    stop: (id: string) => {
      const request = requests.get(id);
      if (request) request.abort();
      else change(id, { state: 'stopped' });
    },
    again: (id: string) => {
      change(id, { state: 'waiting', fault: null });
      next();
    },
    /** Takes a finished, failed or stopped one off the list. */
    forget: (id: string) => {
      if (requests.has(id)) return;
      files.delete(id);
      list = list.filter((upload) => upload.id !== id);
      onChange(list);
    },
    /** Something is still on its way. */
    busy: () => list.some(({ state }) => state === 'sending' || state === 'waiting'),
  };
}
