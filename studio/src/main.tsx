import './styles/fonts.ts';
import './styles/index.css';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { App } from './app/app.tsx';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no element #root');
createRoot(root).render(
  <StrictMode>
    <App />
  </StrictMode>,
);
