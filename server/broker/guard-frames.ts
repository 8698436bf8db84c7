import type { Duplex } from 'node:stream';
import { createFrameWalker, type FrameFault, type FrameLimits } from './frame-walker.ts';

/**
 * Puts the frame walker before a socket's own buffer. It wraps `push`, through which net and TLS sockets alike hand
 * over what arrived, since whatever reads the socket later would have gathered the packet by then.
 */
export function guardFrames(socket: Duplex, limits: FrameLimits, refuse: (fault: FrameFault) => void): void {
  const walk = createFrameWalker(limits);
  const push = socket.push.bind(socket);
  socket.push = (chunk: unknown, encoding?: BufferEncoding): boolean => {
    const fault = chunk instanceof Uint8Array ? walk(chunk) : undefined;
    if (fault === undefined) return push(chunk, encoding);
    refuse(fault);
    socket.destroy();
    return false;
  };
}
