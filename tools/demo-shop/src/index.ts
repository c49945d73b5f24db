export * from './seed';
export { SHOP as DEMO_SHOP, SIGN_INS as DEMO_SIGN_INS } from './story';
