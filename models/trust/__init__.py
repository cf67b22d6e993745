"""Keys, certificates and sittings: what makes a signature somebody's own.

Cryptography only: it knows no record, no job and no screen. What is kept, and where, is said by
`models/record/`; who may sign what, by `models/acts/`.
"""
