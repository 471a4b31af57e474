export { loadAccount } from './accounts.repository';
export { accountsRoutes } from './accounts.routes';
export { createAccount } from './accounts.service';
export { ensureFirstAdminLink } from './links.service';
export { hashPassword } from './passwords';
export { sessionView } from './session-view';
