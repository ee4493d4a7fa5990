export * from './library';
export * from './people';
export * from './work';
