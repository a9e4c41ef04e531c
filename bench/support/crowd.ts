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
  /** Sent before those and not counted, so that code is compiled and connections are warm. */
  warmUp: number;
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

/** Pages ask for the time each second, of whichever server. */
const askTime = (ask: () => void) => setInterval(ask, 1000).unref();

/** One receiver; `onStamp` gets the server's stamp of each broadcast. Resolves once it hears them. */
function join(order: CrowdOrder, onStamp: (at: number) => void): Promise<Receiver> {
  if (order.kind === 'socket.io')
    return new Promise((resolve) => {
      const socket: Socket = io(order.url, { transports: ['websocket'], forceNew: true });
      socket.on('event', ({ event }: { event: { at: number } }) => onStamp(event.at));
      socket.on('connect', () => {
        const asking = askTime(() => socket.emit('time', { t1: performance.now() }));
        const close = () => {
          clearInterval(asking);
          socket.close();
        };
        resolve({ send: (text) => socket.emit('command', JSON.parse(text)), close });
      });
    });
  return new Promise((resolve, reject) => {
    const socket = new WebSocket(order.url, { headers: order.headers, perMessageDeflate: false });
    const receiver = { send: (text: string) => socket.send(text), close: () => socket.terminate() };
    socket.on('error', reject);
    socket.on('open', () => {
      const asking = askTime(() => socket.send(JSON.stringify({ type: 'time', t1: performance.now() })));
      socket.on('close', () => clearInterval(asking));
      if (order.kind === 'ws') return resolve(receiver);
      socket.send(JSON.stringify({ type: 'hello', protocol: protocolVersion, epoch: null, revision: null }));
    });
    socket.on('message', (data) => {
      const message = JSON.parse(data.toString()) as { type: string; event?: { at: number } };
      if (message.type === 'event' && message.event) onStamp(message.event.at);
      else if (message.type === 'welcome') resolve(receiver);
    });
  });
}

let orders = 0;

async function perform(order: CrowdOrder): Promise<CrowdReport> {
  orders += 1;
  let latencies: number[] = [];
  let wanted = Number.POSITIVE_INFINITY;
  let all: () => void = () => undefined;
  const receivers: Receiver[] = [];
  for (let one = 0; one < order.receivers; one += 1)
    receivers.push(
      await join(order, (at) => {
        latencies.push(now() - at);
        if (latencies.length === wanted) all();
      }),
    );
  /** Sends commands at the pace and waits for what comes of them, five seconds at most. */
  const round = async (name: string, commands: number): Promise<void> => {
    latencies = [];
    wanted = order.receivers * commands;
    const arrived = new Promise<void>((resolve) => {
      all = resolve;
    });
    for (let sent = 0; sent < commands; sent += 1) {
      const command = {
        // A hub takes each id once.
        id: `${order.kind}-${process.pid}-${orders}-${name}-${sent}`,
        expiresAt: now() + 5000,
        body: { kind: 'dimmer.set', level: (sent % 100) / 100 },
      };
      receivers[0]?.send(JSON.stringify({ type: 'command', command }));
      await new Promise((resolve) => setTimeout(resolve, 1000 / order.pace));
    }
    await Promise.race([arrived, new Promise((resolve) => setTimeout(resolve, 5000))]);
  };
  await round('warm', order.warmUp);
  process.send?.('ready');
  await new Promise<void>((resolve) => process.once('message', () => resolve()));
  await round('measured', order.commands);
  for (const receiver of receivers) receiver.close();
  return { deliveries: latencies.length, latencies: latencies.sort((a, b) => a - b) };
}

/** One order after the other until the bench hangs up. */
async function obey(): Promise<void> {
  while (process.connected) {
    const order = await new Promise<CrowdOrder>((resolve) => process.once('message', resolve));
    process.send?.(await perform(order));
  }
}

process.once('disconnect', () => process.exit(0));
await obey();
