// Texts of the help come into the bundle as they are.
declare module "*.txt" {
  const text: string;
  export default text;
}
declare module "*.css";
