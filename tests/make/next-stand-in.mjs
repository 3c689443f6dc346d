// Takes the place of `next` in the tests of the set-up: the same commands, a real HTTP server, the real database, in milliseconds.
import { appendFileSync, mkdirSync } from 'node:fs';
import http from 'node:http';
import pg from 'pg';

const [mode, , host, , port] = process.argv.slice(2);

if (mode === 'build') {
  mkdirSync('.next', { recursive: true });
  appendFileSync('.next/builds', 'built\n');
} else {
  http
    .createServer((request, response) => answer(request, response).catch((error) => response.writeHead(500).end(String(error))))
    .listen(Number(port), host);
}

async function answer(request, response) {
  if (request.url === '/api/health') return response.end('healthy');
  if (request.url === '/told') return response.end(JSON.stringify(process.env));
  const client = new pg.Client({ connectionString: process.env.DATABASE_URL });
  await client.connect();
  if (request.method === 'POST') await client.query("insert into readings values ('typed by a technician')");
  const { rows } = await client.query('select what from readings');
  await client.end();
  response.end(JSON.stringify(rows.map((row) => row.what)));
}
