/** The server's sentence, below the button that was pressed. Its lines are kept free, so that it moves nothing. */
export function FormRefusal({ children }: { readonly children?: string }) {
  return (
    <p role="alert" className="mt-2 min-h-10 text-sm leading-5 text-pretty text-falls">
      {children}
    </p>
  );
}
