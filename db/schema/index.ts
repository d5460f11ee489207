export * from './actions';
export * from './batches';
export * from './people';
export * from './reports';
export * from './sheets';
export * from './sites';
export * from './troubles';
