import { QueryClientProvider } from '@tanstack/react-query';
import { RouterProvider } from 'react-router-dom';
import { paths } from '#src/lib/paths.ts';
import { createQueryClient } from '#src/lib/query-client.ts';
import { createRouter } from './router.tsx';

/** Somebody whose session is over signs in again and comes back to the page they were on. */
const leave = () => {
  const { pathname, search } = location;
  if (pathname === paths.signIn()) return;
  queryClient.clear();
  void router.navigate(paths.signIn(pathname + search), { replace: true });
};

const queryClient = createQueryClient(leave);
const router = createRouter(queryClient);

export function App() {
  return (
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  );
}
