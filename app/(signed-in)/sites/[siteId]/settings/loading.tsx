export { PageLoading as default } from '../../../_components/page-loading';
