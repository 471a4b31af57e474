import { useRef } from 'react';
import { useMutation } from '@tanstack/react-query';
import { newId } from '../../shared/kernel/ids';
import { ApiError, send, type Method } from './api';

/** A change as it goes to the server; the path is below `/api`. */
export interface Wish {
  method: Exclude<Method, 'GET'>;
  path: string;
  body?: object;
}

/**
 * Sends changes one at a time. The same wish sent again after the network failed keeps its key, so that it has no second effect.
 * @param onDone what to do with the answer, before the change counts as finished
 */
export function useSend<R = unknown>(onDone?: (reply: R) => unknown) {
  const kept = useRef<{ text: string; key: string } | null>(null);
  return useMutation<R, Error, Wish>({
    mutationFn: async ({ method, path, body }) => {
      const text = JSON.stringify([method, path, body]);
      if (kept.current?.text !== text) kept.current = { text, key: newId() };
      try {
        const reply = await send<R>(method, path, body, kept.current.key);
        kept.current = null;
        return reply;
      } catch (error) {
        if (error instanceof ApiError) kept.current = null;
        throw error;
      }
    },
    onSuccess: onDone ? (reply) => onDone(reply) : undefined,
  });
}
