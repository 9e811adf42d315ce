export { PageFrame as default } from '../page-frame';
