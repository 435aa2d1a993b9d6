/**
 * The order of imports. Each room may import the rooms before it in `order`, never the ones after it; core stays
 * free of Node and of the page. The check fails when it saw no modules, so that a moved folder cannot pass unseen.
 */
const core = ['units', 'numerics', 'vehicle', 'trials', 'study', 'evaluate'].map((room) => `src/core/${room}`);
const above = ['src/core/(search|front)', 'src/charts', 'src/(page|run)', 'src/cli'];
const order = [...core, ...above];

const rules = order.slice(0, -1).map((room, index) => ({
  name: `${room.replace(/[^a-z]+/g, '-')}-looks-down`,
  comment: `${room} may import only itself and the rooms below it`,
  severity: 'error',
  from: { path: `^${room}/` },
  to: { path: `^(${order.slice(index + 1).join('|')}|workers)/` },
}));

module.exports = {
  forbidden: [
    ...rules,
    { name: 'search-and-front-apart', severity: 'error', from: { path: '^src/core/search/' }, to: { path: '^src/core/front/' } },
    { name: 'front-and-search-apart', severity: 'error', from: { path: '^src/core/front/' }, to: { path: '^src/core/search/' } },
    { name: 'page-and-run-apart', severity: 'error', from: { path: '^src/page/' }, to: { path: '^src/run/' } },
    { name: 'run-and-page-apart', severity: 'error', from: { path: '^src/run/' }, to: { path: '^src/page/' } },
    { name: 'thread-by-url-only', severity: 'error', from: { path: '^src/' }, to: { path: '^workers/' } },
    { name: 'core-is-pure', severity: 'error', from: { path: '^src/core/' }, to: { dependencyTypes: ['core'] } },
    { name: 'no-circles', severity: 'error', from: {}, to: { circular: true } },
    { name: 'resolvable', severity: 'error', from: {}, to: { couldNotResolve: true } },
  ],
  required: [],
  options: {
    tsConfig: { fileName: 'tsconfig.json' },
    tsPreCompilationDeps: true,
    doNotFollow: { path: 'node_modules' },
    enhancedResolveOptions: { exportsFields: ['exports'], conditionNames: ['import', 'node', 'default', 'types'], extensions: ['.ts', '.js', '.mjs', '.json'] },
  },
};
