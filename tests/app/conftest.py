from tests.app.open_shop import empty_shop, made_shop, open_window, shop, shop_folder

__all__ = ["empty_shop", "made_shop", "open_window", "shop", "shop_folder"]
