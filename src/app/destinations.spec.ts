import { destinationsWithin } from './destinations';

describe('the destinations', () => {
  it('are those that have a route, in their own order', () => {
    const routes = [{ path: 'loggers' }, { path: 'account' }, { path: 'room' }, { path: '**' }];
    expect(destinationsWithin(routes).map(({ label }) => label)).toEqual(['Room', 'Loggers']);
  });
});
