export * from './letters.ts';
export * from './money.ts';
export * from './people.ts';
export * from './practice.ts';
export * from './training.ts';
