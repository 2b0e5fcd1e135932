import './index.css';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { ErrorBoundary } from './error-boundary.tsx';
import { makeQueryClient } from './query-client.ts';
import { Router } from './router.tsx';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no #root');

createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={makeQueryClient()}>
      <ErrorBoundary place="app">
        <Router />
      </ErrorBoundary>
    </QueryClientProvider>
  </StrictMode>,
);
