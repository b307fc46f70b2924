export { OpenLinkPage as Component } from '../features/inspection/components/open-link-page.tsx';
