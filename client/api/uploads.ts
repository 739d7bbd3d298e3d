import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { idSchema } from '#shared/schemas/primitives.ts';
import type { AcceptUpload } from '#shared/schemas/runs.ts';
import { uploadSchema, type ReadingChoices, type Upload } from '#shared/schemas/uploads.ts';
import { ApiError, fetchJson, postJson, putJson, refusalOf, sendOnly } from './http.ts';

/** Often enough that the bar moves, seldom enough to be no load. */
const ASK_EVERY_MS = 400;

const acceptedSchema = z.object({ runIds: z.array(idSchema) });

/** A staged file. While it is being read, how far that is. */
export function uploadQuery(id: string) {
  return queryOptions({
    queryKey: ['uploads', id],
    queryFn: ({ signal }) => fetchJson(uploadSchema, `/api/uploads/${id}`, { signal }),
    refetchInterval: ({ state }) =>
      state.data?.reading.state === 'reading' ? ASK_EVERY_MS : false,
    staleTime: Infinity,
    // Once nobody looks at it, it is soon forgotten: the file may be gone.
    gcTime: 2_000,
  });
}

type Sending = {
  visitId: string;
  file: File;
  /** Told the share that has gone out, 0 to 1. */
  onProgress: (share: number) => void;
  signal: AbortSignal;
};

/** Sends a file. fetch cannot tell how far a body has gone, so this is the one place that asks the older way. */
export function useSendFile() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: sendFile,
    onSuccess: (upload) => queryClient.setQueryData(uploadQuery(upload.id).queryKey, upload),
  });
}

function sendFile({ visitId, file, onProgress, signal }: Sending): Promise<Upload> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    const body = new FormData();
    body.append('file', file, file.name);
    request.upload.addEventListener('progress', ({ loaded, total }) => {
      if (total > 0) onProgress(loaded / total);
    });
    request.addEventListener('load', () => {
      readAnswer(request.status, request.responseText).then(resolve, reject);
    });
    request.addEventListener('error', () => reject(notSent()));
    request.addEventListener('abort', () => reject(new DOMException('Cancelled', 'AbortError')));
    signal.addEventListener('abort', () => request.abort());
    request.open('POST', `/api/uploads?visitId=${visitId}`);
    request.send(body);
  });
}

async function readAnswer(status: number, text: string): Promise<Upload> {
  const response = new Response(text, { status });
  if (!response.ok) throw await refusalOf(response);
  return uploadSchema.parse(await response.json());
}

function notSent() {
  return new ApiError(0, {
    code: 'not-sent',
    message: 'The selected file could not be sent – try again',
  });
}

/** A person's corrections and answers; the file is read anew. */
export function useChooseReading(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (choices: ReadingChoices) =>
      putJson(uploadSchema, `/api/uploads/${id}/choices`, choices),
    onSuccess: (upload) => queryClient.setQueryData(uploadQuery(id).queryKey, upload),
  });
}

/** Throws the staged file away; one that is already gone is as good. */
export function useDiscardUpload() {
  return useMutation({
    mutationFn: async (id: string) => {
      try {
        await sendOnly('DELETE', `/api/uploads/${id}`);
      } catch (error) {
        if (!(error instanceof ApiError && error.status === 404)) throw error;
      }
    },
  });
}

/** Makes runs of a staged file: what its visit, job and machine show is stale from then on. */
export function useAcceptUpload(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (accept: AcceptUpload) =>
      postJson(acceptedSchema, `/api/uploads/${id}/accept`, accept),
    onSuccess: () =>
      Promise.all(
        ['visits', 'rounds', 'jobs', 'machines'].map((noun) =>
          queryClient.invalidateQueries({ queryKey: [noun] }),
        ),
      ),
  });
}
