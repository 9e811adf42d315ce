import { EXPORT_TOKEN, exportResponse, type ExportBody, type ExportItem, type ExportWire } from '../schemas/exports';
import { ApiError, getJson } from './get-json';

export type MadeFile = { readonly blob: Blob; readonly name: string };
/** `total` is null until it is known. */
export type Progress = { readonly done: number; readonly total: number | null };

const KEY = 'sesqui.export-token';
const LOOK_MS = 350;

/** What a guest's browser shows to come back to its prints; it gives a right to nothing else. */
const tokenHeaders = (): Record<string, string> => {
  const token = localStorage.getItem(KEY);
  return token === null ? {} : { [EXPORT_TOKEN]: token };
};

function keepToken({ token }: ExportWire): void {
  try {
    if (token !== undefined) localStorage.setItem(KEY, token);
  } catch {
    // A full store: the print can then not be come back to after a reload.
  }
}

const pause = (ms: number, signal: AbortSignal): Promise<void> =>
  new Promise((resolve, reject) => {
    const stop = () => {
      clearTimeout(timer);
      reject(signal.reason as Error);
    };
    const timer = setTimeout(() => {
      signal.removeEventListener('abort', stop);
      resolve();
    }, ms);
    signal.addEventListener('abort', stop, { once: true });
  });

async function fileOf({ id, file }: ExportItem, headers: Record<string, string>, signal: AbortSignal): Promise<MadeFile> {
  const response = await fetch(`/api/exports/${id}/file`, { headers, signal }).catch((error: unknown) => {
    if (signal.aborted) throw error;
    throw new ApiError('offline', 'Sesqui cannot be reached. Check the connection and try again.', 0);
  });
  if (!response.ok) throw new ApiError('not_found', 'The print is no longer kept. Ask for it again.', response.status);
  return { blob: await response.blob(), name: file?.name ?? 'print.pdf' };
}

/**
 * Has a print made, waits for it and fetches it; cancelled, it is not made any further.
 * @throws ApiError with the sentence that says why it cannot be made
 */
export async function print(body: ExportBody, onProgress: (progress: Progress) => void, signal: AbortSignal): Promise<MadeFile> {
  const asked = (await getJson('/api/exports', { method: 'POST', headers: { 'content-type': 'application/json', ...tokenHeaders() }, body: JSON.stringify(body), signal })) as ExportWire;
  keepToken(asked);
  const headers = { ...tokenHeaders(), ...(asked.token !== undefined && { [EXPORT_TOKEN]: asked.token }) };
  const path = `/api/exports/${asked.export.id}`;
  try {
    for (let item = exportResponse.parse(asked).export; ; ) {
      if (item.state === 'done') return await fileOf(item, headers, signal);
      if (item.state === 'failed') throw new ApiError(item.error?.code ?? 'internal', item.error?.message ?? 'This could not be printed.', 422);
      if (item.state === 'cancelled') throw new ApiError('cancelled', 'This print was cancelled, perhaps in another window.', 409);
      onProgress(item);
      await pause(LOOK_MS, signal);
      item = exportResponse.parse(await getJson(path, { headers, signal })).export;
    }
  } catch (error) {
    if (signal.aborted) void fetch(path, { method: 'DELETE', headers: { 'content-type': 'application/json', ...headers } }).catch(() => undefined);
    throw error;
  }
}

/** Hands a file to the reader, as the browser hands over any download. */
export function download({ blob, name }: MadeFile): void {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser reads the file after this call.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
