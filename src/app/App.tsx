import { QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import { RouterProvider } from 'react-router-dom';
import { CommandProvider } from '#src/components/commands/CommandProvider.tsx';
import { Toaster } from '#src/components/Toaster.tsx';
import { makeQueryClient } from '#src/lib/queryClient.ts';
import { makeRouter } from './router.tsx';

export function App() {
  const [client] = useState(makeQueryClient);
  const [router] = useState(makeRouter);
  return (
    <QueryClientProvider client={client}>
      <CommandProvider>
        <RouterProvider router={router} />
        <Toaster />
      </CommandProvider>
    </QueryClientProvider>
  );
}
