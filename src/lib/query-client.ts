import { QueryClient } from '@tanstack/react-query';
import { ApiError } from './api';

/** Reads are tried again when the network was at fault, never when the server said no. */
export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 30_000,
      refetchOnWindowFocus: false,
      retry: (failures, error) => !(error instanceof ApiError) && failures < 3,
    },
    mutations: { retry: false },
  },
});
