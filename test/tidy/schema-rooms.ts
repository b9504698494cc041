/** The root types and what all capabilities use; its resolvers live in server/http/. */
const WITHOUT_ROOM = ['base'];

/**
 * Files in schema/ without a folder of the same name in server/: one word for one thing everywhere.
 * Takes the paths of all files of the repository.
 */
export function schemasWithoutRoom(paths: readonly string[]): string[] {
  return paths
    .flatMap((path) => /^schema\/(.+)\.graphql$/.exec(path)?.[1] ?? [])
    .filter((name) => !WITHOUT_ROOM.includes(name))
    .filter((name) => !paths.some((path) => path.startsWith(`server/${name}/`)));
}
