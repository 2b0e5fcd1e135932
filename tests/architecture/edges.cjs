/** The only edges between slices, both sides: from → may use the front door of. Edges run one way. */
module.exports = {
  server: {
    accounts: [],
    centre: [],
    notices: [],
    ingest: ['centre'],
    floor: ['centre', 'calls', 'runs', 'leagues', 'readiness', 'numbers'],
    calls: ['centre', 'notices'],
    runs: ['centre'],
    leagues: ['centre'],
    readiness: ['centre', 'calls', 'runs', 'leagues', 'notices'],
    numbers: ['centre', 'notices'],
  },
  client: {
    accounts: [],
    centre: [],
    floor: ['calls', 'runs'],
    calls: [],
    runs: [],
    leagues: [],
    readiness: [],
    numbers: [],
  },
};
