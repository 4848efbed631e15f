import { createHash } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import type { Duplex } from 'node:stream';

// RFC 6455, section 1.3.
const WEBSOCKET_GUID = '258EAFA5-E914-47DA-95CA-C5AB0DC85B11';

/**
 * Takes a WebSocket handshake (RFC 6455, section 4.2.2) for a line on which nothing is said: that it is open tells the
 * host that the window lives, and the window that the host does. A WebSocket because a browser allows many of them,
 * while it allows only six plain connections, which windows would use up. False when it is no handshake.
 */
export function takeLine(request: IncomingMessage, socket: Duplex, onEnd: () => void): boolean {
  const key = request.headers['sec-websocket-key'];
  const version = request.headers['sec-websocket-version'];
  if (request.headers.upgrade?.toLowerCase() !== 'websocket' || typeof key !== 'string' || version !== '13')
    return false;
  const accept = createHash('sha1')
    .update(key + WEBSOCKET_GUID)
    .digest('base64');
  socket.write(
    `HTTP/1.1 101 Switching Protocols\r\nUpgrade: websocket\r\nConnection: Upgrade\r\nSec-WebSocket-Accept: ${accept}\r\n\r\n`,
  );
  // The window has nothing to say on it: its first frame is the closing one, and anything else is a fault.
  socket.once('data', () => socket.end());
  socket.on('error', () => socket.destroy());
  socket.once('end', () => socket.end());
  socket.once('close', onEnd);
  return true;
}
