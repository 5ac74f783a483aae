import { Tooltip } from 'radix-ui';
import { RouterProvider } from 'react-router-dom';
import { router } from './router.tsx';

/** Everything the pages share: tooltips and the router. */
export function App() {
  return (
    <Tooltip.Provider delayDuration={400}>
      <RouterProvider router={router} />
    </Tooltip.Provider>
  );
}
