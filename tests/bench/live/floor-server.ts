import http from 'node:http';
import Database from 'better-sqlite3';
import express from 'express';
import { Server } from 'socket.io';

/**
 * The floor: a bare Express handler with one transaction of as many writes as a claim makes (WAL, synchronous FULL), and
 * one broadcast of the same size for each claim.
 * Arguments: database file, bytes of a broadcast, writes of a claim.
 */
const [, , file = '', bytes = '600', writes = '5'] = process.argv;
const db = new Database(file);
db.pragma('journal_mode = WAL');
db.pragma('synchronous = FULL');
db.exec('CREATE TABLE floor (id INTEGER PRIMARY KEY, step TEXT NOT NULL, body TEXT NOT NULL)');
const insert = db.prepare('INSERT INTO floor (step, body) VALUES (?, ?)');
const body = 'x'.repeat(120);
const claim = db.transaction((stepId: string) => {
  for (let index = 0; index < Number(writes); index += 1) insert.run(stepId, body);
});
const padding = 'x'.repeat(Math.max(0, Number(bytes) - 60));
const app = express();
const server = http.createServer(app);
const io = new Server(server, { serveClient: false });
app.get('/api/session', (_req, res) => {
  res.json({ data: null });
});
app.post('/api/claim/:stepId', express.json(), (req, res) => {
  const { stepId } = req.params;
  claim(stepId);
  res.json({ data: { stepId } });
  io.emit('claimed', { stepId, padding });
});
server.listen(0, '127.0.0.1', () => {
  const address = server.address();
  if (address && typeof address === 'object')
    process.send?.({ listening: `http://127.0.0.1:${address.port}` });
});
process.on('SIGTERM', () => process.exit(0));
