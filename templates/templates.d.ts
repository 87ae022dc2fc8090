declare module '*.hbs' {
  /** Fills the template; throws when a figure that it prints is not in the view. */
  const template: (view: object) => string;
  export default template;
}
