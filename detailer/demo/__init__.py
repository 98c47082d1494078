"""The Tern Quay project: what is drawn when no project is named, and a project to begin from."""
