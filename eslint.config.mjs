import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTs from 'eslint-config-next/typescript';
import { defineConfig, globalIgnores } from 'eslint/config';

/** A wall: files of a folder may not import what the patterns name, and the message says why. */
function wall(files, patterns, ignores = []) {
  return {
    files,
    ignores,
    rules: { 'no-restricted-imports': ['error', { patterns }] },
  };
}

const SERVER = {
  regex: '^@/(db|app/_server)(/|$)',
  message: 'Browser code never reaches the database or the server: call a server action or a route handler.',
};

export default defineConfig([
  ...nextVitals,
  ...nextTs,
  globalIgnores(['.next/**', '.local/**', 'next-env.d.ts', 'coverage/**', 'test-results/**', 'playwright-report/**', 'app/dev-*/**']),
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  { files: ['scripts/**', 'tests/bench/**', 'tests/**/*.mjs'], rules: { 'no-console': 'off' } },
  {
    files: ['{solver,canvas,components,db,app}/**/*.{ts,tsx}'],
    ignores: ['app/**/{page,layout,loading,error,not-found,global-error,template,default,route,opengraph-image}.tsx', 'app/**/icon.tsx'],
    rules: {
      'import/no-default-export': 'error',
    },
  },
  wall(['solver/**'], [
    {
      // Only what is inside the folder, complex.js and ml-matrix.
      regex: '^(?!\\.{1,2}/|complex\\.js$|ml-matrix$)',
      message: 'The solver could be published by itself: it imports nothing but complex.js and ml-matrix.',
    },
    { regex: '^\\.\\./\\.\\./\\.\\./', message: 'The solver does not reach out of its own folder.' },
  ]),
  wall(
    ['canvas/{document,geometry,commands,parts,network,labels}/**'],
    [
      SERVER,
      {
        regex: '^(react|react-dom|reactflow|zustand|next)(/|$)|/(react|store)/',
        message: 'This folder is pure: no React, no store, no screen. Work on documents, and let canvas/react show them.',
      },
      { regex: '^@/(app|components)(/|$)', message: 'The drawing does not know the application around it.' },
    ],
  ),
  wall(['canvas/store/**'], [
    SERVER,
    { regex: '^(react|react-dom|reactflow|next)(/|$)', message: 'The store is not a component: no React in it.' },
    { regex: '^@/(app|components)(/|$)', message: 'The drawing does not know the application around it.' },
  ]),
  wall(['canvas/react/**'], [
    SERVER,
    { regex: '^@/app(/|$)', message: 'The drawing does not know the application around it: take it as props.' },
  ]),
  wall(['components/**'], [
    SERVER,
    {
      regex: '^@/(solver|canvas|app)(/|$)',
      message: 'Components are presentational: props in, events out. They know no models and fetch nothing.',
    },
  ]),
  wall(['db/**'], [
    {
      regex: '^@/(app/(?!_server/(env|log)|_shared)|components|canvas/(?!document))',
      message: 'The database knows documents and what crosses the wire, not the application or the drawing surface.',
    },
  ]),
  wall(['app/**/*.{ts,tsx}'], [{ regex: '^@/db/(?!queries|seeds|health)', message: 'db/queries is the one door to the database.' }], [
    'app/_server/**',
  ]),
]);
