export * from './actions';
export * from './people';
export * from './reports';
export * from './sites';
