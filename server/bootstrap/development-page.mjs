/** The client in development: modules as they are written, replaced while the page stays open. */
import { createServer } from 'vite';

process.once('disconnect', () => process.exit(0));
process.once('SIGTERM', () => process.exit(0));
const server = await createServer();
await server.listen();
process.send?.({ type: 'ready' });
