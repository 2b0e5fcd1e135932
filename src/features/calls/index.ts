export { CallPage } from './call-page.tsx';
export { CallsPage } from './calls-page.tsx';
export { CallAlerts } from './components/call-alerts.tsx';
export { RaiseForm } from './components/raise-form.tsx';
export { useCallActions } from './mutations.ts';
