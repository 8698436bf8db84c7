export { hashPassword } from './password.ts';
