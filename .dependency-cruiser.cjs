// Packages import only downwards and nothing imports in a circle. Checked by tests/checks/layers.mjs, which also asserts that modules were seen.
const below = {
  quantity: [],
  engine: [],
  circuit: ['quantity', 'engine'],
  rules: ['quantity', 'circuit'],
  language: ['quantity', 'circuit', 'rules'],
  cli: ['quantity', 'circuit', 'rules', 'language'],
  vscode: ['quantity', 'circuit', 'rules', 'language'],
};
const portable = ['quantity', 'engine', 'circuit', 'rules'];
module.exports = {
  forbidden: [
    { name: 'no-circle', severity: 'error', from: {}, to: { circular: true } },
    { name: 'not-resolvable', severity: 'error', from: {}, to: { couldNotResolve: true, pathNot: '^(vscode)$' } },
    ...Object.entries(below).map(([name, lower]) => ({
      name: `${name}-imports-only-downwards`,
      severity: 'error',
      from: { path: `^packages/${name}/` },
      to: { path: '^packages/', pathNot: `^packages/(${[name, ...lower].join('|')})/` },
    })),
    {
      name: 'portable-packages-know-no-node',
      severity: 'error',
      from: { path: `^packages/(${portable.join('|')})/` },
      to: { dependencyTypes: ['core'] },
    },
    { name: 'packages-do-not-import-tests', severity: 'error', from: { path: '^packages/' }, to: { path: '^tests/' } },
  ],
  options: {
    parser: 'swc',
    tsPreCompilationDeps: true,
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)(dist|\\.cache)/' },
    enhancedResolveOptions: { extensions: ['.ts', '.js', '.mjs'], exportsFields: ['exports'], conditionNames: ['import', 'node', 'browser', 'default'] },
  },
};
