import { carePlacesWithin } from './care-places';

describe('the pages about care', () => {
  it('are those that have a route, in their own order', () => {
    const routes = [{ path: 'record' }, { path: 'rota/week' }, { path: '' }];
    expect(carePlacesWithin(routes).map(({ label }) => label)).toEqual(['Today', 'Record']);
  });
});
