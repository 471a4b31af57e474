export { sendDueLetters, smtpPostman, type Postman } from './mail.service';
export { openOutbox, type Outbox } from './outbox';
export { mailRoutes } from './mail.routes';
