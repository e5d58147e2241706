import { StrictMode } from 'react';
import { QueryClientProvider } from '@tanstack/react-query';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { createQueryClient } from '#src/lib/query-client.ts';
import '#src/styles/main.css';
import { router } from './router.tsx';

const root = document.getElementById('root');
if (!root) throw new Error('The page has no place for the application.');

createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  </StrictMode>,
);
