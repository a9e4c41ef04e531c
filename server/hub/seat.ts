import type { Duplex } from 'node:stream';
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

/**
 * Makes one whole text frame of a message, so that every receiver gets the very same bytes in one write: final, unmasked,
 * opcode 1, length in 7, 16 or 64 bits. RFC 6455 section 5.2.
 */
export function encode(message: FromHub): Buffer {
  const text = JSON.stringify(message);
  const length = Buffer.byteLength(text);
  const head = length < 126 ? 2 : length < 65_536 ? 4 : 10;
  const frame = Buffer.allocUnsafe(head + length);
  frame[0] = 0x81;
  if (head === 2) frame[1] = length;
  else if (head === 4) {
    frame[1] = 126;
    frame.writeUInt16BE(length, 2);
  } else {
    frame[1] = 127;
    frame.writeBigUInt64BE(BigInt(length), 2);
  }
  frame.write(text, head);
  return frame;
}

/**
 * A seat for a socket that the hub has let in.
 * @param wire what the socket writes to; nothing is ever compressed, so whole frames of ours may go between its own
 * @param now ms
 */
export function makeSeat(
  socket: WebSocket,
  wire: Duplex,
  who: SocketCaller,
  showId: string,
  room: RoomKind,
  now: number,
): Seat {
  const sendFrame = (frame: Buffer): void => {
    if (socket.readyState !== socket.OPEN) return;
    // Whoever reads too slowly joins anew: a queue of old news helps nobody.
    if (wire.writableLength > hubLimits.backlog) return socket.terminate();
    wire.write(frame);
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
