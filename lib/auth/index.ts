// Signing in. The rest of the product knows these names and no library behind them.
export {
  blankCookie,
  closeAllSessions,
  closeSession,
  type CookieToSet,
  openSession,
  readSession,
  sessionCookieName,
} from './lucia';
export { hashPassword, verifyNobody, verifyPassword } from './password';
export { hashSecret, makeSecret } from './secrets';
