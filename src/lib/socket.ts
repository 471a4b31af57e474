import { io, type Socket } from 'socket.io-client';
import type { ClientEvents, ServerEvents } from '../../shared/contracts/live';

export type LiveSocket = Socket<ServerEvents, ClientEvents>;

/** A socket to this page's own server that tries again for as long as the page is open. */
export function openSocket(): LiveSocket {
  return io({
    autoConnect: false,
    reconnection: true,
    reconnectionDelay: 500,
    reconnectionDelayMax: 5000,
    randomizationFactor: 0.5,
    timeout: 8000,
  });
}
