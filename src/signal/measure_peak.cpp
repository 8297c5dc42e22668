namespace loqsmith {}
