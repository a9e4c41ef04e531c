import { io, type Socket } from 'socket.io-client';
import { WebSocket } from 'ws';
import { protocolVersion } from '../../shared/protocol/constants';

/** What a crowd is asked to do; sent by the bench over the process channel. */
export interface CrowdOrder {
  kind: 'hub' | 'ws' | 'socket.io';
  url: string;
  headers: Record<string, string>;
  receivers: number;
  commands: number;
  /** Commands a second. */
  pace: number;
}

/** What it measured: latencies from the server's stamp to a receiver's parse, ms, sorted. */
export interface CrowdReport {
  deliveries: number;
  latencies: number[];
}

const now = () => performance.timeOrigin + performance.now();

interface Receiver {
  send: (text: string) => void;
  close: () => void;
}

/** One receiver; `onStamp` gets the server's stamp of each broadcast. Resolves once it hears them. */
function join(order: CrowdOrder, onStamp: (at: number) => void): Promise<Receiver> {
  if (order.kind === 'socket.io')
    return new Promise((resolve) => {
      const socket: Socket = io(order.url, { transports: ['websocket'], forceNew: true });
      socket.on('event', ({ event }: { event: { at: number } }) => onStamp(event.at));
      socket.on('connect', () =>
        resolve({ send: (text) => socket.emit('command', JSON.parse(text)), close: () => socket.close() }),
      );
    });
  return new Promise((resolve, reject) => {
    const socket = new WebSocket(order.url, { headers: order.headers, perMessageDeflate: false });
    const receiver = { send: (text: string) => socket.send(text), close: () => socket.terminate() };
    socket.on('error', reject);
    socket.on('open', () => {
      if (order.kind === 'ws') return resolve(receiver);
      socket.send(JSON.stringify({ type: 'hello', protocol: protocolVersion, epoch: null, revision: null }));
      // The hub cuts whoever says nothing; pages ask for the time each second.
      setInterval(() => socket.send(JSON.stringify({ type: 'time', t1: performance.now() })), 1000).unref();
    });
    socket.on('message', (data) => {
      const message = JSON.parse(data.toString()) as { type: string; event?: { at: number } };
      if (message.type === 'event' && message.event) onStamp(message.event.at);
      else if (message.type === 'welcome') resolve(receiver);
    });
  });
}

async function perform(order: CrowdOrder): Promise<CrowdReport> {
  const latencies: number[] = [];
  const wanted = order.receivers * order.commands;
  let all: () => void = () => undefined;
  const arrived = new Promise<void>((resolve) => {
    all = resolve;
  });
  const receivers: Receiver[] = [];
  for (let one = 0; one < order.receivers; one += 1)
    receivers.push(
      await join(order, (at) => {
        latencies.push(now() - at);
        if (latencies.length === wanted) all();
      }),
    );
  process.send?.('ready');
  await new Promise<void>((resolve) => process.once('message', () => resolve()));
  const [sender] = receivers;
  for (let sent = 0; sent < order.commands; sent += 1) {
    const command = {
      id: `${order.kind}-${process.pid}-${sent}`,
      expiresAt: now() + 5000,
      body: { kind: 'dimmer.set', level: (sent % 100) / 100 },
    };
    sender?.send(JSON.stringify({ type: 'command', command }));
    await new Promise((resolve) => setTimeout(resolve, 1000 / order.pace));
  }
  await Promise.race([arrived, new Promise((resolve) => setTimeout(resolve, 5000))]);
  for (const receiver of receivers) receiver.close();
  return { deliveries: latencies.length, latencies: latencies.sort((a, b) => a - b) };
}

process.once('message', async (order: CrowdOrder) => {
  const report = await perform(order);
  process.send?.(report, () => process.exit(0));
});
