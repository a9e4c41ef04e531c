import type { WebSocket } from 'ws';
import type { SocketCaller } from '#server/services/socketCaller';
import type { FromHub } from '#shared/protocol/messages';
import type { Principal } from '#shared/show/roles';
import type { RoomKind } from '#shared/show/state';
import { bucket, hubLimits } from './limits';

/** One open socket in a room. */
export interface Seat {
  who: SocketCaller;
  principal: Principal;
  showId: string;
  room: RoomKind;
  /** User or display, as events name it. */
  by: string;
  /** True once it has said hello and was welcomed. */
  ready: boolean;
  openedAt: number;
  heardAt: number;
  junk: number;
  within: {
    command: (now: number) => boolean;
    draft: (now: number) => boolean;
    other: (now: number) => boolean;
  };
  /** Sends what was encoded already. */
  sendFrame: (frame: Buffer) => void;
  send: (message: FromHub) => void;
  close: (code: number, why: string) => void;
  /** Cuts it without a word. */
  cut: () => void;
}

/** Makes one frame of a message; every receiver gets the same bytes. */
export const encode = (message: FromHub): Buffer => Buffer.from(JSON.stringify(message));

/** A seat for a socket that the hub has let in. `now` in ms. */
export function makeSeat(
  socket: WebSocket,
  who: SocketCaller,
  showId: string,
  room: RoomKind,
  now: number,
): Seat {
  const sendFrame = (frame: Buffer): void => {
    if (socket.readyState !== socket.OPEN) return;
    // Whoever reads too slowly joins anew: a queue of old news helps nobody.
    if (socket.bufferedAmount > hubLimits.backlog) return socket.terminate();
    socket.send(frame, { binary: false, compress: false });
  };
  return {
    who,
    principal: who.kind === 'display' ? 'display' : who.role,
    showId,
    room,
    by: who.kind === 'display' ? who.displayId : who.userId,
    ready: false,
    openedAt: now,
    heardAt: now,
    junk: 0,
    within: {
      command: bucket(hubLimits.commandsPerSecond),
      draft: bucket(hubLimits.draftsPerSecond),
      other: bucket(hubLimits.othersPerSecond),
    },
    sendFrame,
    send: (message) => sendFrame(encode(message)),
    close: (code, why) => socket.close(code, why),
    cut: () => socket.terminate(),
  };
}
